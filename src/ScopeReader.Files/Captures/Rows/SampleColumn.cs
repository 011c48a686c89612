using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace ScopeReader.Files.Rows;

/// <summary>The numbers of one column, as they come in; NaN where a sample is missing.</summary>
internal sealed unsafe class SampleColumn
{
    private double[] _values;
    private int _saidToBeNone;

    /// <param name="expected">How many there may be; room for them is taken at once, so that nothing is copied later.</param>
    public SampleColumn(int expected) => _values = Room(Math.Max(expected, 64));

    /// <summary>How many there are.</summary>
    public int Count { get; private set; }

    /// <summary>How many of them are missing.</summary>
    public int Missing { get; private set; }

    /// <summary>How many there are up to the last that is a value or said to be none; behind it the column was not filled.</summary>
    public int Filled => Math.Max(_saidToBeNone, Values.LastIndexOfAnyExcept(double.NaN) + 1);

    /// <summary>What is there so far.</summary>
    public Span<double> Values => _values.AsSpan(0, Count);

    /// <summary>The same, to be kept.</summary>
    public Memory<double> Memory => _values.AsMemory(0, Count);

    /// <summary>Makes room behind what is there, to be written before <see cref="Commit"/>.</summary>
    /// <returns>Where the first number is: it stays there until the next call.</returns>
    public double* Reserve(int count)
    {
        if (count > _values.Length - Count)
        {
            double[] larger = Room((int)Math.Min(Math.Max(Count + (long)count, 2L * _values.Length), Array.MaxLength));
            Values.CopyTo(larger);
            _values = larger;
        }
        return (double*)Unsafe.AsPointer(ref MemoryMarshal.GetArrayDataReference(_values));
    }

    /// <summary>Takes what was written behind the end, none of it missing.</summary>
    public void Commit(int count) => Count += count;

    /// <summary>Adds one.</summary>
    /// <param name="value">NaN where it is missing.</param>
    /// <param name="isSaidToBeNone">True where it is missing in so many words: over range, not a number.</param>
    public void Add(double value, bool isSaidToBeNone = false)
    {
        if (isSaidToBeNone)
            _saidToBeNone = Count + 1;
        if (Count == _values.Length)
            Reserve(1);
        _values[Count++] = value;
        if (double.IsNaN(value))
            Missing++;
    }

    /// <summary>Lets go of all.</summary>
    public void Clear() => (Count, Missing) = (0, 0);

    // Pages that nobody writes to cost no memory, so room may be taken generously; pinned, as several threads write to it.
    private static double[] Room(int count) => GC.AllocateUninitializedArray<double>(count, pinned: true);
}
