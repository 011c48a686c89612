using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>The averaged edges of two captures, laid over each other at their 50 % instants and resampled to the same times.</summary>
/// <param name="Overlay">Both, in the channel's unit over the time from the 50 % instant.</param>
/// <param name="IsRising">Direction.</param>
/// <param name="Placing">Standard uncertainty of one edge's place against the other's, in the overlay's unit of time.</param>
/// <param name="Apart">Value less reference where that is farthest from 0 after both edges' own transitions.</param>
/// <param name="ApartAt">When that is.</param>
/// <param name="ApartUncertainty">Standard uncertainty of <paramref name="Apart"/> from noise and rounding.</param>
internal sealed record EdgeOverlay(Overlay Overlay, bool IsRising, double Placing, double Apart, double ApartAt, double ApartUncertainty)
{
    private const int Points = 400;

    // In transition durations: what lies before the edge, and the least that is shown after it.
    private const double Before = 2, After = 8;

    /// <summary>The overlays of both directions, where both captures have the edges.</summary>
    public static IReadOnlyList<EdgeOverlay> Of(ChannelPair pair)
    {
        ChannelMeasurement a = pair.Reference[0], b = pair.Compared[0];
        var overlays = new List<EdgeOverlay>();
        foreach (bool rising in (ReadOnlySpan<bool>)[true, false])
            if (Placed.Of(a, rising) is { } reference && Placed.Of(b, rising) is { } compared && reference.TimeUnit == compared.TimeUnit && reference.Unit == compared.Unit)
                overlays.Add(Of(reference, compared, pair.File, rising));
        return overlays;
    }

    private static EdgeOverlay Of(Placed a, Placed b, string file, bool rising)
    {
        double duration = Math.Max(a.Duration, b.Duration);
        double start = Math.Max(-Before * duration, Math.Max(a.Start, b.Start));
        double end = Math.Min(Math.Max(After * duration, 1.3 * Math.Max(a.Settling, b.Settling)), Math.Min(a.End, b.End)), step = (end - start) / (Points - 1);
        double[] reference = new double[Points], compared = new double[Points];
        (double Value, double At, double Uncertainty) apart = (0, 0, 0);
        for (int i = 0; i < Points; i++)
        {
            double t = start + i * step;
            (reference[i], double ua) = a.At(t, step);
            (compared[i], double ub) = b.At(t, step);
            // On the slopes a difference of durations says it all; what counts here is what comes after them.
            if (t > duration && Math.Abs(compared[i] - reference[i]) > Math.Abs(apart.Value))
                apart = (compared[i] - reference[i], t, double.Hypot(ua, ub));
        }
        string title = $"{(rising ? "rising" : "falling")} edge, from the 50 % instant";
        return new EdgeOverlay(new Overlay(title, file, a.TimeUnit, a.Unit, start, step, reference, compared), rising,
            double.Hypot(a.Placing, b.Placing), apart.Value, apart.At, apart.Uncertainty);
    }

    // An averaged edge in the channel's unit and seconds.
    private sealed record Placed(MeasuredEdge Edge, double Scale, double From, double Step, string Unit, string TimeUnit, double Settling)
    {
        public double Duration => Edge.Duration * Scale;

        public double Start => Edge.Edge.Times[0] * Scale;

        public double End => Edge.Edge.Times[^1] * Scale;

        public double Placing => Edge.Middle.Noise * Scale;

        public static Placed? Of(ChannelMeasurement channel, bool rising)
        {
            if (channel.Channel is not Waveform waveform || channel.Edges.FirstOrDefault(e => e.Edge.IsRising == rising) is not { } edge
                || channel.Primary(Quantities.LowLevel) is not { } low || channel.Primary(Quantities.HighLevel) is not { } high)
                return null;
            double settling = channel.Primary(rising ? Quantities.RiseSettling : Quantities.FallSettling)?.Value ?? 0;
            var (from, to) = rising ? (low.Value, high.Value) : (high.Value, low.Value);
            return new Placed(edge, waveform.Interval, from, to - from, waveform.Unit, waveform.Axis.TimeUnit, settling);
        }

        // A straight line through the points of one step either side, which no noise of a single point moves; between sparse
        // points the line through the two nearest.
        public (double Value, double Uncertainty) At(double time, double reach)
        {
            AveragedEdge edge = Edge.Edge;
            double t = time / Scale, half = reach / Scale;
            int first = edge.IndexAt(t - half), end = edge.IndexAt(t + half);
            if (end - first < 3 || edge.Times[first] > t || edge.Times[end - 1] < t)
            {
                first = Math.Clamp(edge.IndexAt(t) - 1, 0, edge.Times.Length - 2);
                end = first + 2;
            }
            double w = 0, x = 0, y = 0, xx = 0, xy = 0;
            for (int i = first; i < end; i++)
            {
                double weight = 1 / edge.Variance(i), d = edge.Times[i] - t;
                (w, x, y, xx, xy) = (w + weight, x + weight * d, y + weight * edge.Values[i], xx + weight * d * d, xy + weight * d * edge.Values[i]);
            }
            double determinant = w * xx - x * x;
            double value = determinant > 0 ? (xx * y - x * xy) / determinant : y / w;
            return (From + Step * value, Math.Abs(Step) * Math.Sqrt(determinant > 0 ? xx / determinant : 1 / w));
        }
    }
}
