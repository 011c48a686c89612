namespace ScopeReader.Edges;

/// <summary>A pulse that leaves a state and turns back before it reaches the other (IEEE Std 181; term).</summary>
/// <param name="Index">Index of the sample where it goes farthest.</param>
/// <param name="FromHigh">True where it left the high state.</param>
/// <param name="Reach">How far it went, of the amplitude, 0 to 1.</param>
public readonly record struct Runt(int Index, bool FromHigh, double Reach)
{
    /// <summary>Every runt, in order.</summary>
    /// <param name="samples">Shape [n], equally spaced.</param>
    /// <param name="low">Low state level, in the samples' unit.</param>
    /// <param name="high">High state level, above <paramref name="low"/>.</param>
    /// <param name="noise">Rms noise of one sample.</param>
    /// <param name="edges">The qualified transitions, in order.</param>
    /// <remarks>
    /// A pulse counts that passes the threshold on its own side of the middle which <see cref="Transitions"/> has, and comes back
    /// without passing the other. What more than a quarter of the edges have after them is ringing and no runt.
    /// </remarks>
    public static IReadOnlyList<Runt> Find(ReadOnlySpan<double> samples, double low, double high, double noise, IReadOnlyList<Transition> edges)
    {
        ArgumentNullException.ThrowIfNull(edges);
        double middle = (low + high) / 2, half = Transitions.Hysteresis(high - low, noise);
        var found = new List<Runt>();
        // Within a state: from the sample after one edge's far threshold to the last before the next edge's near one.
        for (int k = 0; k <= edges.Count; k++)
        {
            bool isHigh = k > 0 ? edges[k - 1].IsRising : edges.Count > 0 && !edges[0].IsRising;
            int from = k > 0 ? edges[k - 1].Index + 1 : 0, to = k < edges.Count ? edges[k].Index + 1 : samples.Length;
            double near = isHigh ? middle + half : middle - half;
            bool Beyond(double value) => isHigh ? value < near : value > near;
            while (from < to && Beyond(samples[from]))
                from++;
            while (to > from && Beyond(samples[to - 1]))
                to--;
            for (int i = from; i < to; i++)
            {
                if (!Beyond(samples[i]))
                    continue;
                int farthest = i;
                for (; i < to && Beyond(samples[i]); i++)
                    if (isHigh ? samples[i] < samples[farthest] : samples[i] > samples[farthest])
                        farthest = i;
                double reach = isHigh ? (high - samples[farthest]) / (high - low) : (samples[farthest] - low) / (high - low);
                found.Add(new Runt(farthest, isHigh, reach));
            }
        }
        return 4 * found.Count > edges.Count + 3 ? [] : found;
    }
}
