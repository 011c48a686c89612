namespace ScopeReader.Numerics;

/// <summary>Cosines and sines of equal parts of a turn.</summary>
internal static class TurnTable
{
    /// <summary>Points 0 to count - 1 of a turn divided into equal parts.</summary>
    /// <param name="parts">Parts of a turn, 1 or more.</param>
    /// <param name="count">How many points, at most <paramref name="parts"/>.</param>
    /// <returns>The values of <see cref="Turn.Of(long, long)"/>, an eighth of them computed where symmetry gives the others.</returns>
    public static (double[] Cosine, double[] Sine) Of(int parts, int count)
    {
        double[] cosine = new double[count], sine = new double[count];
        if (parts % 8 != 0)
        {
            for (int k = 0; k < count; k++)
                (cosine[k], sine[k]) = Turn.Of(k, parts);
            return (cosine, sine);
        }
        int eighth = parts / 8, quarter = parts / 4;
        double[] c = new double[eighth + 1], s = new double[eighth + 1];
        for (int k = 0; k <= eighth; k++)
            (c[k], s[k]) = Turn.Of(k, parts);
        for (int k = 0; k < count; k++)
        {
            int within = k % quarter;
            (double x, double y) = within <= eighth ? (c[within], s[within]) : (s[quarter - within], c[quarter - within]);
            (cosine[k], sine[k]) = (k / quarter) switch
            {
                0 => (x, y),
                1 => (-y, x),
                2 => (-x, -y),
                _ => (y, -x),
            };
        }
        return (cosine, sine);
    }
}
