using System.Globalization;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Allan deviation over the averaging times that the edges allow.</summary>
/// <remarks>Primary is the longest time that ten stretches of the record fit into; the others are ten, a hundred … times shorter.</remarks>
internal static class AllanReadings
{
    private const int FewestEdges = 20, Stretches = 10;
    private const double AboveFloor = 1.4;

    /// <summary>Adds them, or why not.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="instants">Instants of edges of one direction, samples.</param>
    /// <param name="numbers">Number of each edge.</param>
    /// <param name="origin">Instant of edge 0 on the grid.</param>
    /// <param name="period">Period of the grid, samples.</param>
    /// <param name="floor">The digitiser's part of an edge's timing, rms, samples.</param>
    public static void Add(WaveformJob job, double[] instants, int[] numbers, double origin, double period, double floor)
    {
        (int first, int end) = LongestRun(numbers);
        if (end - first < FewestEdges)
        {
            job.Sheet.Refuse("too-few-edges", string.Create(CultureInfo.InvariantCulture, $"the longest run without a missing edge has {end - first}, and an Allan deviation needs {FewestEdges}; capture a longer record"), Quantities.AllanDeviation);
            return;
        }
        var phases = new double[end - first];
        for (int i = 0; i < phases.Length; i++)
            phases[i] = instants[first + i] - origin - period * numbers[first + i];
        bool isPrimary = true;
        for (int averaged = phases.Length / Stretches; averaged >= 1; averaged = averaged > 1 ? averaged / 10 : 0)
        {
            One(job, phases, period, averaged, floor, isPrimary);
            isPrimary = false;
        }
    }

    private static void One(WaveformJob job, double[] phases, double period, int averaged, double floor, bool isPrimary)
    {
        double perSample = job.Waveform.Interval * job.Chain.TimeFactor, measured = AllanDeviation.Of(phases, period, averaged);
        // White timing noise s gives √3 s/τ.
        double own = Math.Sqrt(3) * floor / (averaged * period), relative = 1 / Math.Sqrt(2 * AllanDeviation.DegreesOfFreedom(phases.Length, averaged));
        string at = $"at τ = {Engineering.Format(averaged * period * perSample, job.Waveform.Axis.TimeUnit, 3)}";
        if (measured <= AboveFloor * own)
        {
            if (isPrimary)
                job.Sheet.RefuseBelow("digitiser-floor", at + " " + JitterAnalyser.AtMost(job, measured * (1 + 2 * relative), own, "1", phases.Length), measured * (1 + 2 * relative), Quantities.AllanDeviation);
            return;
        }
        (double value, List<BudgetTerm> terms) = JitterAnalyser.AboveTheFloor(measured, own, relative);
        job.Sheet.Add(new Reading(Quantities.AllanDeviation, value, "1", new Budget(terms), string.Create(CultureInfo.InvariantCulture, $"overlapping-{averaged}"))
        {
            IsPrimary = isPrimary,
            Count = phases.Length,
            Note = at + ", the timebase's own in it" + JitterAnalyser.FloorNote(job, own, "1"),
        });
    }

    private static (int First, int End) LongestRun(int[] numbers)
    {
        (int first, int end) best = (0, 0);
        int start = 0;
        for (int i = 1; i <= numbers.Length; i++)
            if (i == numbers.Length || numbers[i] != numbers[i - 1] + 1)
            {
                if (i - start > best.end - best.first)
                    best = (start, i);
                start = i;
            }
        return best;
    }
}
