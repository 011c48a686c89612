using ScopeReader.Readings;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Levels;

public class StraysTests
{
    private static ChannelMeasurement Spiked(double height)
    {
        double[] samples = Square(97.3, 20000, 0.01).Samples.ToArray();
        samples[12340] += height;
        return Measure(Of(samples));
    }

    // Source: the spike is put there. The wave's own peak-to-peak is 1 V, and must not move with it.
    [Fact]
    public void A_spike_is_found_and_left_out_of_peak_to_peak()
    {
        ChannelMeasurement measured = Spiked(3);
        string text = measured.Findings.Single(f => f.Code == "spike").Text;

        Assert.StartsWith("1 sample lies beyond anything the wave does in its period: ", text, StringComparison.Ordinal);
        Assert.Contains("at 123.4 µs", text, StringComparison.Ordinal);
        // Tolerance: four stated standard uncertainties.
        Reading peakToPeak = measured.Reading(Quantities.PeakToPeak);
        Assert.Equal(1, peakToPeak.Value, 4 * peakToPeak.Budget.StandardUncertainty);
    }

    [Fact]
    public void Noise_is_no_spike() => Assert.DoesNotContain(Spiked(0).Findings, f => f.Code == "spike");
}
