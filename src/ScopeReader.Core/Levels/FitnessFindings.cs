using System.Globalization;
using ScopeReader.Frequency;
using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>Whether rate and range of the digitiser suit the wave, and what to change on it where they do not.</summary>
internal static class FitnessFindings
{
    private const double FewPerEdge = 3, FewPerCycle = 4, FewCodes = 20, SmallShare = 0.25;
    private const int MostBits = 16;

    /// <summary>Writes the findings.</summary>
    /// <param name="job">The waveform and where findings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <param name="crossings">The periodic edges; null without a period.</param>
    /// <param name="frequency">The primary frequency, cycles per sample; null without one.</param>
    public static void Look(WaveformJob job, WaveShape shape, CrossingFrequency? crossings, double? frequency)
    {
        if (shape.Kind == WaveKind.Flat)
            return;
        if (frequency is > 1 / FewPerCycle)
            job.Sheet.Add(new Finding("aliasing-doubt", string.Create(CultureInfo.InvariantCulture,
                $"{1 / frequency:0.00} samples per cycle: a tone above half the sample rate would look the same; take a record at another sample rate, where a true line stays and a folded one moves")));
        else if (shape.Kind == WaveKind.TwoState && crossings is { EdgeDuration: < FewPerEdge })
            job.Sheet.Add(new Finding("few-samples-per-edge", crossings.IsResolved
                ? string.Create(CultureInfo.InvariantCulture, $"{crossings.EdgeDuration:0.0} samples on an edge from 10 to 90 %: instants of edges are uncertain by interpolation, and what the edge holds beyond half the sample rate is folded back; sample {2 * FewPerEdge / crossings.EdgeDuration:0} times as fast")
                : "the edges fall between two samples: their duration and what rings on them do not show, and harmonics beyond half the sample rate are folded back; sample faster, by the shortest edge at least three samples on it"));
        Codes(job, shape);
    }

    private static void Codes(WaveformJob job, WaveShape shape)
    {
        if (!(shape.Step > 0))
            return;
        double codes = (shape.Maximum - shape.Minimum) / shape.Step + 1;
        if (job.Plan.Chain.Bits is { } bits and <= MostBits)
        {
            double all = 1 << bits;
            if (codes > 1.01 * all)
                job.Sheet.Add(new Finding("bits-doubt", string.Create(CultureInfo.InvariantCulture,
                    $"the values span {codes:0} steps of {Engineering.Format(shape.Step, job.Waveform.Unit, 3)}, more than the plan's {bits} bits have: the instrument averages or interpolates, or bits is another; what it states of one sample's noise is then not the converter's")));
            else if (codes < SmallShare * all)
                job.Sheet.Add(new Finding("few-codes", string.Create(CultureInfo.InvariantCulture,
                    $"the wave spans {codes:0} of the {all:0} codes that {bits} bits have; a vertical range {Math.Floor(all / codes / 1.2):0} times smaller would show as many times more of it")));
        }
        else if (codes < FewCodes)
        {
            job.Sheet.Add(new Finding("few-codes", string.Create(CultureInfo.InvariantCulture,
                $"the values take {codes:0} steps of {Engineering.Format(shape.Step, job.Waveform.Unit, 3)}: levels and noise are known to a good part of a step only; use a smaller vertical range, or export more digits")));
        }
    }
}
