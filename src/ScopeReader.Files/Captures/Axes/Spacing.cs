namespace ScopeReader.Files.Axes;

/// <summary>One even spacing fitted to a column of printed values.</summary>
/// <param name="Start">Value of the first.</param>
/// <param name="Interval">Step from one to the next: negative where they fall.</param>
/// <param name="Low">The smallest step that the printed digits allow.</param>
/// <param name="High">The largest.</param>
/// <param name="WorstDeviation">How far the worst printed value lies off the even one.</param>
/// <param name="IsExact">True where every printed step is the same.</param>
internal sealed record Spacing(double Start, double Interval, double Low, double High, double WorstDeviation, bool IsExact)
{
    /// <summary>The spacing of the same values with their signs turned.</summary>
    public Spacing Reversed() => new(-Start, -Interval, -High, -Low, WorstDeviation, IsExact);
}
