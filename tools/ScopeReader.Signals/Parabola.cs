namespace ScopeReader.Signals;

internal static class Parabola
{
    /// <summary>Highest value of the parabola through three equally spaced points, the middle one highest.</summary>
    public static double Top(double before, double middle, double after)
    {
        double bend = 2 * middle - before - after, slope = after - before;
        return bend > 0 ? middle + slope * slope / (8 * bend) : middle;
    }
}
