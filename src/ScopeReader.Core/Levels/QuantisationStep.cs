namespace ScopeReader.Levels;

/// <summary>The step between neighbouring values of a converter, or of a file that prints few digits.</summary>
/// <remarks>
/// The greatest common spacing of the distinct values: the smallest spacing, or a half to a quarter of it, that every value
/// is a whole number of steps away from the first by. A step that was scaled and then printed to few digits still counts:
/// a value may lie 0.1 step off the grid.
/// </remarks>
public static class QuantisationStep
{
    private const int Inspected = 32768, LargestDivisor = 4;
    private const double OffGrid = 0.1;

    /// <summary>Finds the step.</summary>
    /// <param name="samples">Shape [n], any unit, n of 1 or more.</param>
    /// <returns>The step in the samples' unit; 0 where the values lie on no grid, or are too few to tell.</returns>
    public static double Find(ReadOnlySpan<double> samples)
    {
        double[] values = Scattered.Take(samples, Inspected);
        Array.Sort(values);
        double tiny = 1e-9 * Math.Max(Math.Abs(values[0]), Math.Abs(values[^1]));
        int distinct = 1;
        double smallest = double.PositiveInfinity;
        for (int i = 1; i < values.Length; i++)
        {
            double spacing = values[i] - values[distinct - 1];
            if (spacing <= tiny)
                continue;
            smallest = Math.Min(smallest, spacing);
            values[distinct++] = values[i];
        }
        // A handful of values that never repeat lie on some grid by chance.
        if (distinct < 2 || (distinct < 8 && distinct > values.Length / 2))
            return 0;
        ReadOnlySpan<double> found = values.AsSpan(0, distinct);
        for (int divisor = 1; divisor <= LargestDivisor; divisor++)
            if (TryGrid(found, smallest / divisor) is { } step)
                return step;
        return 0;
    }

    // Counts steps from value to value, so that an error of the first guess does not add up, and refines the step as it goes.
    private static double? TryGrid(ReadOnlySpan<double> values, double step)
    {
        double count = 0, origin = values[0];
        for (int i = 1; i < values.Length; i++)
        {
            count += Math.Round((values[i] - values[i - 1]) / step);
            if (Math.Abs(values[i] - origin - count * step) > OffGrid * step)
            {
                double refined = (values[i] - origin) / count;
                if (Math.Abs(values[i] - values[i - 1] - Math.Round((values[i] - values[i - 1]) / step) * step) > 2 * OffGrid * step)
                    return null;
                step = refined;
            }
        }
        step = (values[^1] - origin) / count;
        foreach (double value in values)
        {
            double steps = (value - origin) / step;
            if (Math.Abs(steps - Math.Round(steps)) > 2 * OffGrid)
                return null;
        }
        return step;
    }
}
