namespace ScopeReader.Files.Rows;

/// <summary>The numbers of one column, as they come in; NaN where a sample is missing.</summary>
internal sealed class SampleColumn
{
    private double[] _values = new double[1024];

    /// <summary>How many there are.</summary>
    public int Count { get; private set; }

    /// <summary>How many of them are missing.</summary>
    public int Missing { get; private set; }

    /// <summary>What is there so far.</summary>
    public ReadOnlySpan<double> Values => _values.AsSpan(0, Count);

    /// <summary>Adds one.</summary>
    public void Add(double value)
    {
        if (Count == _values.Length)
            Array.Resize(ref _values, 2 * Count);
        _values[Count++] = value;
        if (double.IsNaN(value))
            Missing++;
    }
}
