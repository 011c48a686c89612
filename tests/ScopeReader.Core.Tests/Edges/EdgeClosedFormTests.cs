using System.Numerics;
using ScopeReader.Edges;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Edges;

/// <summary>Edges whose every figure is known in closed form, sampled densely and without noise.</summary>
public class EdgeClosedFormTests
{
    // A cubic over a twentieth of the edge leaves 2e-6 of a Gaussian edge's duration; a kink at the foot of a single pole's
    // edge, which lies at the border of that window, up to 2e-5.
    private const double CubicTolerance = 1e-5;

    public static TheoryData<string, double> BandwidthFactors => new()
    {
        { "single pole", 0.34969915256606 }, // A01, closed form ln 9/(2π) and simulated step
        { "Gaussian", 0.339624446253827 }, // A03, closed form
        { "2-pole Butterworth", 0.341870863939969 }, // A06, residues and simulated step
        { "critically damped", 0.343954625925103 }, // A07
        { "3-pole Butterworth", 0.364489976968834 }, // A08
        { "4-pole Butterworth", 0.387129947236457 }, // A09
        { "4-pole Bessel", 0.350129977417768 }, // A10
    };

    [Theory]
    [MemberData(nameof(BandwidthFactors))]
    public void Rise_time_times_bandwidth_is_that_of_the_response(string response, double factor)
    {
        var (step, corner) = Response(response);
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(step, 0.02, 8, 60));
        Assert.Equal(factor, sheet.Value(Quantities.RiseTime) * corner / (2 * Math.PI), CubicTolerance);
    }

    [Fact]
    public void Chain_factors_are_what_edges_of_those_responses_show()
    {
        // A01, A03, A09 as above: what the finding about the chain's bandwidth uses.
        Assert.Equal(0.34969915256606, ChainBandwidth.SinglePole, 1e-14);
        Assert.Equal(0.339624446253827, ChainBandwidth.Gaussian, 1e-14);
        var (step, corner) = Response("4-pole Butterworth");
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(step, 0.02, 8, 60));
        Assert.Equal(sheet.Value(Quantities.RiseTime) * corner / (2 * Math.PI), ChainBandwidth.Flat, CubicTolerance);
    }

    // A15: variances add, 3 and 4 give 5.
    [Fact]
    public void Gaussian_stages_combine_as_the_root_of_the_sum_of_squares() =>
        Assert.Equal(5e-9, ChainBandwidth.Combine(3e-9, 4e-9), 1e-20);

    [Theory]
    [InlineData("single pole", 1.58496250072116)] // A11, closed form
    [InlineData("Gaussian", 1.52271771958992)] // A12
    [InlineData("ramp", 1.33333333333333)] // A13
    public void Ratio_of_durations_tells_the_shape(string response, double ratio)
    {
        (_, IReadOnlyList<MeasuredEdge> edges) = Steps.Measure(Steps.Record(Response(response).Step, 0.02, 8, 60));
        Assert.Equal(ratio, (edges[0].Between(10, 90) / edges[0].Between(20, 80))!.Value, 5 * CubicTolerance);
    }

    // A21: 3.3 V with 1.2 ns from 10 to 90 % is 2.2 V/ns: a straight ramp of 1.5 ns.
    [Fact]
    public void Slew_rate_of_a_ramp_is_its_slope()
    {
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(t => 3.3 * Math.Clamp(t / 1.5e-9, 0, 1), 0.01e-9, 4e-9, 20e-9), new(0, 3.3, 0, 0, 0));
        Assert.Equal(2.2e9, sheet.Value(Quantities.RiseSlew), 2.2e9 * CubicTolerance);
        Assert.Equal("V/s", sheet.Primary(Quantities.RiseSlew)!.Unit);
    }

    [Fact]
    public void Second_order_step_has_the_tabulated_figures()
    {
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(SecondOrder(0.5), 0.0125, 20, 60));
        // D13: t(10-90) ω_n at ζ = 0.5, root and sampled response; its tolerance.
        Assert.Equal(1.63757294732835, sheet.Value(Quantities.RiseTime), 1e-5);
        // D04: 16.3034 %. The cubic over a fifth of the edge takes 3/35 h⁴ y''''/24 off the top: 1e-4 of the excursion.
        Assert.Equal(16.303353482158, sheet.Value(Quantities.RiseOvershoot), 0.002);
        // D12: last entry into ±2 % at 8.07635/ω_n from the step; the 50 % instant from the closed form. D12's tolerance, three times for the cubic.
        double middle = Root(SecondOrder(0.5), 0.5, 0, 2);
        Assert.Equal(8.076348973928 - middle, sheet.Value(Quantities.RiseSettling), 1e-4);
    }

    private static (Func<double, double> Step, double Corner) Response(string name) => name switch
    {
        "single pole" => (Steps.Of(-1), 1),
        "Gaussian" => (t => BoundedNormal.NormalCumulative(t), Math.Sqrt(Math.Log(2))),
        "2-pole Butterworth" => (Steps.Of(Steps.Butterworth(2)), 1),
        "3-pole Butterworth" => (Steps.Of(Steps.Butterworth(3)), 1),
        "4-pole Butterworth" => (Steps.Of(Steps.Butterworth(4)), 1),
        "critically damped" => (t => t < 0 ? 0 : 1 - (1 + t) * Math.Exp(-t), Math.Sqrt(Math.Sqrt(2) - 1)),
        "4-pole Bessel" => (Steps.Of(Steps.Bessel4().Poles), Steps.Bessel4().Corner),
        "ramp" => (t => Math.Clamp(t / 2, 0, 1), 1),
        _ => throw new ArgumentException(name),
    };

    private static Func<double, double> SecondOrder(double ratio)
    {
        var pole = new Complex(-ratio, Math.Sqrt(1 - ratio * ratio));
        return Steps.Of(pole, Complex.Conjugate(pole));
    }

    private static double Root(Func<double, double> step, double level, double from, double to) =>
        MathNet.Numerics.FindRoots.OfFunction(t => step(t) - level, from, to, 1e-13);
}
