using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>Looks for samples that lie beyond anything the folded wave does: spikes, which averaging over periods hides.</summary>
internal static class Strays
{
    // Noise of n samples reaches √(2 ln n) sigma, and three sigma further hardly ever; a few percent of the wave is its own variety.
    private const double Beyond = 3, LeastShare = 0.05, MostShare = 0.01;

    /// <summary>Writes a finding where a stray shows.</summary>
    /// <param name="job">The waveform and where findings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <param name="noise">Rms noise of one sample.</param>
    /// <param name="highest">Highest value of the folded wave.</param>
    /// <param name="lowest">Lowest value of the folded wave.</param>
    public static void Look(WaveformJob job, WaveShape shape, double noise, double highest, double lowest)
    {
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        double reach = Math.Max(LeastShare * (highest - lowest), noise * (Math.Sqrt(2 * Math.Log(samples.Length)) + Beyond)) + shape.Step;
        double above = shape.Maximum - highest, below = lowest - shape.Minimum;
        if (Math.Max(above, below) <= reach)
            return;
        bool isAbove = above > below;
        int count = 0, at = 0;
        for (int i = 0; i < samples.Length; i++)
            if (samples[i] > highest + reach || samples[i] < lowest - reach)
            {
                count++;
                if (samples[i] == (isAbove ? shape.Maximum : shape.Minimum))
                    at = i;
            }
        if (count > MostShare * samples.Length)
            return;
        string unit = job.Waveform.Unit;
        double instant = job.Waveform.Axis.Start + at * job.Waveform.Interval;
        job.Sheet.Add(new Finding("spike", string.Create(CultureInfo.InvariantCulture,
            $"{count} sample{(count == 1 ? "" : "s")} lie{(count == 1 ? "s" : "")} beyond anything the wave does in its period: {Engineering.Format(samples[at], unit)} at {Engineering.Format(instant, job.Waveform.Axis.TimeUnit)}, {Engineering.Format(Math.Max(above, below), unit)} past its {(isAbove ? "highest" : "lowest")} value; peak-to-peak is of the folded wave and leaves {(count == 1 ? "it" : "them")} out: trigger on {(count == 1 ? "it" : "them")} to see whether a neighbour switches then"),
            isAbove ? "above" : "below"));
    }
}
