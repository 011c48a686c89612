namespace ScopeReader.Numerics;

/// <summary>Sums of a pure tone over N samples, the instants t counted from the middle of the record, in closed form.</summary>
/// <param name="Cosine">Σ cos(2πft) = sin(Nh)/sin(h), h = πf: Dirichlet's kernel D.</param>
/// <param name="TimeSine">Σ t sin(2πft), less the kernel's first derivative by 2h.</param>
/// <param name="SquareCosine">Σ t² cos(2πft), less its second.</param>
public readonly record struct Dirichlet(double Cosine, double TimeSine, double SquareCosine)
{
    /// <summary>The sums for a frequency.</summary>
    /// <param name="frequency">Cycles per sample, any value.</param>
    /// <param name="count">N, 1 or more.</param>
    /// <remarks>Closer than two cycles a record to a whole frequency the closed form loses digits, and the terms are added up.</remarks>
    public static Dirichlet Of(double frequency, int count)
    {
        double whole = Math.Round(frequency);
        if (frequency == whole)
        {
            // Half-integer instants of an even record change sign with each whole cycle per sample.
            double sign = count % 2 == 0 && whole % 2 != 0 ? -1 : 1, n = count;
            return new Dirichlet(sign * n, 0, sign * n * (n * n - 1) / 12);
        }
        return Math.Abs(frequency - whole) * count < 2 ? Added(frequency, count) : Closed(frequency, count);
    }

    // From D sin h = sin Nh, differentiated once and twice by h.
    private static Dirichlet Closed(double frequency, int count)
    {
        (double ch, double sh) = Turn.Of(frequency, 0.5);
        (double cn, double sn) = Turn.Of(frequency, count / 2.0);
        double n = count, d = sn / sh;
        double first = (n * cn - d * ch) / sh;
        double second = d * (1 - n * n) - 2 * first * ch / sh;
        return new Dirichlet(d, -first / 2, -second / 4);
    }

    private static Dirichlet Added(double frequency, int count)
    {
        double cosine = 0, timeSine = 0, squareCosine = 0, middle = (count - 1) / 2.0;
        for (int i = 0; i < count; i++)
        {
            double t = i - middle;
            (double c, double s) = Turn.Of(frequency, t);
            cosine += c;
            timeSine += t * s;
            squareCosine += t * t * c;
        }
        return new Dirichlet(cosine, timeSine, squareCosine);
    }
}
