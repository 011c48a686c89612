namespace ScopeReader.Numerics;

/// <summary>Points of the unit circle, from turns instead of radians, so that whole turns cost no accuracy.</summary>
public static class Turn
{
    /// <summary>Cosine and sine of a rational part of a turn.</summary>
    /// <param name="numerator">Any integer below 2^60 in size.</param>
    /// <param name="denominator">1 or more, below 2^60.</param>
    /// <returns>Each within an ulp or so: the angle is brought below an eighth of a turn in integers first.</returns>
    public static (double Cosine, double Sine) Of(long numerator, long denominator)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(denominator, 1);
        long inTurn = numerator % denominator;
        long quarters = (8 * inTurn + (inTurn < 0 ? -denominator : denominator)) / (2 * denominator);
        double angle = Math.PI / 2 * (4 * inTurn - quarters * denominator) / denominator;
        (double s, double c) = Math.SinCos(angle);
        return (quarters & 3) switch
        {
            0 => (c, s),
            1 => (-s, c),
            2 => (-c, -s),
            _ => (s, -c),
        };
    }

    /// <summary>Cosine and sine of <paramref name="frequency"/> · <paramref name="time"/> turns.</summary>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="time">Samples.</param>
    /// <remarks>The product's rounding error is kept (one fused multiply-add), so a million cycles cost no phase.</remarks>
    public static (double Cosine, double Sine) Of(double frequency, double time)
    {
        double product = frequency * time, lost = Math.FusedMultiplyAdd(frequency, time, -product);
        double turns = product - Math.Round(product) + lost;
        (double s, double c) = Math.SinCos(2 * Math.PI * turns);
        return (c, s);
    }
}
