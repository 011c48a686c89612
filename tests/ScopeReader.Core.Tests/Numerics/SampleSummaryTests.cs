using ScopeReader.Numerics;
using static ScopeReader.Tests.Numerics.CertifiedData;
using static ScopeReader.Tests.Numerics.PolynomialFitTests;

namespace ScopeReader.Tests.Numerics;

public class SampleSummaryTests
{
    [Fact]
    public void NumAcc4_agrees_with_its_certified_values_to_8_digits()
    {
        SampleSummary summary = SampleSummary.Of(NumAcc4());

        // G38 to G40: NIST StRD, certified. Doubles cannot hold 10000000.1 closer than 1e-9, a part in 10⁸ of its distance from the mean.
        AssertDigits(14, 10000000.2, summary.Mean);
        AssertDigits(8, 0.1, summary.StandardDeviation);
        AssertDigits(8, -0.999, summary.Lag1);
    }

    [Fact]
    public void Michelso_agrees_with_its_certified_values_to_12_digits()
    {
        SampleSummary summary = SampleSummary.Of(Columns("michelson.csv")[0]);

        // G41 to G43: NIST StRD, certified.
        AssertDigits(12, 299.8524, summary.Mean);
        AssertDigits(12, 0.0790105478190518, summary.StandardDeviation);
        AssertDigits(12, 0.535199668621283, summary.Lag1);
    }
}
