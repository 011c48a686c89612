using ScopeReader.Files.Plans;
using ScopeReader.Limits;

namespace ScopeReader.Tests.Plans;

public class LimitLineReaderTests
{
    private const string Start = "[[limit-line]]\nname = \"mask\"\nunit = \"dBm\"\n";

    [Fact]
    public void Every_key_of_a_limit_line_arrives()
    {
        LimitLine line = PlanReader.Parse("""
            [[limit-line]]
            name = "harmonics"
            unit = "dBuV"
            points = [["150 kHz", 66], ["500 kHz", "56 dBµV"], ["30 MHz", 60.5]]
            side = "lower"
            interpolation = "log"
            rule = "simple"
            guard = 0.5
            """, "plan.toml").LimitLines.Single();
        Assert.Equal(("harmonics", "dBµV", LineSide.Lower, LineInterpolation.Logarithmic, DecisionRule.Simple, 0.5), (line.Name, line.Unit, line.Side, line.Interpolation, line.Rule, line.Guard));
        Assert.Equal([(150e3, 66), (500e3, 56), (30e6, 60.5)], line.Points);
    }

    [Fact]
    public void A_line_is_upper_linear_and_guarded_unless_it_says_otherwise()
    {
        LimitLine line = PlanReader.Parse(Start + "points = [[\"1 MHz\", -40], [\"2 MHz\", -60]]", "plan.toml").LimitLines.Single();
        Assert.Equal((LineSide.Upper, LineInterpolation.Linear, DecisionRule.Guarded, 1d), (line.Side, line.Interpolation, line.Rule, line.Guard));
    }

    [Theory]
    [InlineData("[[limit-line]]\nname = \"mask\"", "plan.toml, line 1: this limit line has no unit; add unit = \"dBm\", or another")]
    [InlineData("[limit-line]\nname = \"mask\"", "plan.toml, line 1: expected [[limit-line]], with two brackets, found [limit-line]")]
    [InlineData("[[limit-line]]\nname = \"mask\"\nunit = \"dB\"\npoints = []", "plan.toml, line 3: unit: expected dBm or dBc or dBµV or dBV, found \"dB\"")]
    [InlineData(Start + "points = [[\"1 MHz\", -40]]", "plan.toml, line 4: points: expected two points or more, such as [[\"1 MHz\", -40], [\"30 MHz\", -60]], found [[\"1 MHz\", -40]]")]
    [InlineData(Start + "points = [[\"1 MHz\", -40],\n[\"0.5 MHz\", -40]]", "plan.toml, line 5: points: point 2 has a lower frequency than the one before")]
    [InlineData(Start + "points = [[\"1 MHz\", -40], [-40]]", "plan.toml, line 4: points: expected a frequency and a level, such as [\"1 MHz\", -40], found [-40]")]
    [InlineData(Start + "points = [[\"1 MHz\", \"-40 dBc\"], [\"2 MHz\", -40]]", "plan.toml, line 4: points: expected a value in dBm, such as -10 dBm, found \"-40 dBc\"")]
    [InlineData(Start + "interpolation = \"log\"\npoints = [[\"0 Hz\", -40], [\"2 MHz\", -40]]", "plan.toml, line 5: points: point 1 needs a frequency above zero, for the interpolation is log")]
    [InlineData(Start + "sides = \"upper\"", "plan.toml, line 4: unknown key \"sides\"; the nearest is side")]
    public void What_is_no_line_is_refused_with_its_place(string text, string message) =>
        Assert.Equal(message, Assert.Throws<PlanException>(() => PlanReader.Parse(text, "plan.toml")).Message);
}
