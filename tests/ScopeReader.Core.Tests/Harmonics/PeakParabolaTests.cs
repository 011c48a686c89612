using ScopeReader.Harmonics;

namespace ScopeReader.Tests.Harmonics;

public class PeakParabolaTests
{
    [Fact]
    public void Gaussian_line_is_found_exactly_between_its_points()
    {
        // E69, E70: true offset 0.3 point, level 0 dB: a Gaussian is a parabola in dB. Tolerance: the rows'.
        var peak = PeakParabola.Through(-2 * 1.3 * 1.3, -2 * 0.3 * 0.3, -2 * 0.7 * 0.7);
        Assert.Equal(0.3, peak.Offset, 1e-12);
        Assert.Equal(0, peak.Level, 1e-12);
    }

    [Fact]
    public void Uncertainties_are_those_of_small_changes()
    {
        // Central differences of the parabola itself; a step of 1e-4 dB leaves 1e-8 of third order.
        double[] levels = [-3.1, -0.2, -1.4];
        double offset = 0, level = 0;
        for (int i = 0; i < 3; i++)
        {
            PeakParabola up = Changed(levels, i, 1e-4), down = Changed(levels, i, -1e-4);
            double u = 0.01 * (i + 1);
            offset += Math.Pow((up.Offset - down.Offset) / 2e-4 * u, 2);
            level += Math.Pow((up.Level - down.Level) / 2e-4 * u, 2);
        }
        var peak = PeakParabola.Through(levels[0], levels[1], levels[2]);
        Assert.Equal(Math.Sqrt(offset), peak.OffsetUncertainty(0.01, 0.02, 0.03), 1e-8);
        Assert.Equal(Math.Sqrt(level), peak.LevelUncertainty(0.01, 0.02, 0.03), 1e-8);
    }

    private static PeakParabola Changed(double[] levels, int index, double by)
    {
        double[] changed = [.. levels];
        changed[index] += by;
        return PeakParabola.Through(changed[0], changed[1], changed[2]);
    }
}
