using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>Settling duration of an averaged edge: from the 50 % instant to the last entry into a band about the new state.</summary>
/// <remarks>
/// IEEE Std 181-2011 (term; clause not quoted). Where a swing just touches the band, a slightly wider band would be entered
/// a swing earlier: the value at bands moved by 3.5 times the uncertainty of the level tells, and that difference is then a term.
/// </remarks>
internal static class EdgeSettling
{
    private const double Window = 0.2, Doubts = 3.5;

    /// <summary>Writes the reading, or why there is none, down.</summary>
    /// <returns>The settling duration in samples; null where the edge was not seen to settle.</returns>
    public static double? Read(WaveformJob job, MeasuredEdge edge, string note)
    {
        bool rising = edge.Edge.IsRising;
        Quantity quantity = rising ? Quantities.RiseSettling : Quantities.FallSettling;
        double band = job.Plan.Levels.SettlingBandPercent / 100, end = edge.Edge.Times[^1];
        string percent = job.Plan.Levels.SettlingBandPercent.ToString("0.####", CultureInfo.InvariantCulture);
        double duration = edge.Duration;

        if (LocalCurve.About(edge.Edge, end - duration, Window * duration, Widest(duration)) is not { } tail)
        {
            job.Sheet.Refuse("too-few-samples", "too few samples show the course of the wave after the edge; sample faster", quantity);
            return null;
        }
        double places = Math.Max(2, (end - edge.High?.Instant ?? 0) / duration);
        double noise = double.Hypot(tail.Noise, tail.Rounding), floor = noise * Math.Sqrt(2 * Math.Log(places));
        if (floor > band / 2)
        {
            job.Sheet.Refuse("noise", string.Create(CultureInfo.InvariantCulture,
                $"noise of {100 * floor:0.##} % of amplitude hides the entry into a band of ±{percent} %; average more edges or widen the band"), quantity);
            return null;
        }
        double doubt = double.Hypot(noise, edge.AfterUncertainty);
        if (Settled(edge, band) is not { } settled || end - settled.Time < duration)
        {
            job.Sheet.Refuse("not-settled", $"the wave has not settled to ±{percent} % when the next edge or the end of the record comes", quantity);
            return null;
        }

        double toTime = job.Waveform.Interval * job.Chain.TimeFactor, value = settled.Time * toTime, slope = Math.Abs(settled.Slope);
        double wider = Settled(edge, band + Doubts * doubt)?.Time ?? settled.Time, tighter = Settled(edge, Math.Max(band / 10, band - Doubts * doubt))?.Time ?? end;
        double later = Math.Max(0, tighter - settled.Time), earlier = Math.Max(0, settled.Time - wider), jump = Math.Max(later, earlier);
        // Along a slope a band moved in or out moves the entry alike and little; a whole swing takes longer than the edge.
        bool jumps = jump > 3 * Math.Min(later, earlier) + 0.05 * duration || jump > duration;
        BudgetTerm[] terms = jumps
            // The error is nothing or a whole jump: the 95 % of the bound that the interval keeps must hold all of it.
            ? [BudgetTerm.Rectangular("band", (jump + Math.Min(Doubts * noise / slope, jump / 10)) / Budget.Coverage * toTime)]
            : [
                BudgetTerm.Normal("noise", double.Hypot(noise / slope, edge.Middle.Noise) * toTime),
                // The state after the edge moves the band and the 50 % instant, the one before it the instant alone.
                BudgetTerm.Normal(rising ? "high-level" : "low-level", edge.AfterUncertainty, (1 / settled.Slope + 0.5 / edge.Middle.Slope) * toTime),
                BudgetTerm.Normal(rising ? "low-level" : "high-level", edge.BeforeUncertainty, 0.5 / edge.Middle.Slope * toTime),
            ];
        job.Sheet.Add(new Reading(quantity, value, job.Waveform.Axis.TimeUnit, job.Chain.ForTime(value, EdgeTimes.Present(terms)), "averaged-edge")
        {
            Count = edge.Edge.Edges,
            Note = $"to ±{percent} %, {note}" + (jumps ? "; a swing just touches the band" : ""),
        });
        return settled.Time;
    }

    // The last entry into the band, and the slope there.
    private static (double Time, double Slope)? Settled(MeasuredEdge measured, double band)
    {
        AveragedEdge edge = measured.Edge;
        double window = Window * measured.Duration, widest = Widest(measured.Duration), looked = double.PositiveInfinity;
        for (int i = edge.Times.Length - 1; i >= 0 && edge.Times[i] > 0; i--)
        {
            // A point well inside the band needs no closer look, nor one beside a place that was just looked at.
            if (Math.Abs(edge.Values[i] - 1) < band - 4 * Math.Sqrt(edge.Variance(i)) || looked - edge.Times[i] < window / 4)
                continue;
            looked = edge.Times[i];
            if (LocalCurve.About(edge, looked, window, widest) is not { } curve || Math.Abs(curve.Value - 1) <= band)
                continue;
            return Entry(edge, curve, band, window, widest);
        }
        return null;
    }

    // Newton from a place outside the band, each time about a new centre.
    private static (double Time, double Slope)? Entry(AveragedEdge edge, LocalCurve curve, double band, double window, double widest)
    {
        double level = curve.Value > 1 ? 1 + band : 1 - band;
        for (int i = 0; i < 12; i++)
        {
            double time = curve.Centre + Math.Clamp((level - curve.Value) / curve.Slope, -window, window);
            bool done = Math.Abs(time - curve.Centre) < 1e-4 * window;
            if (!double.IsFinite(time) || LocalCurve.About(edge, time, window, widest) is not { } next)
                return null;
            curve = next;
            if (done)
                break;
        }
        return curve.Slope == 0 ? null : (curve.Centre, curve.Slope);
    }

    private static double Widest(double duration) => Math.Max(0.6 * duration, 3);
}
