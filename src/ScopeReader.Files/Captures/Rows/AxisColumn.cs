using ScopeReader.Files.Axes;

namespace ScopeReader.Files.Rows;

/// <summary>The numbers of an axis column. While they are evenly spaced they are checked and let go of, unless all are wanted.</summary>
internal sealed unsafe class AxisColumn(bool keepsAll)
{
    private const double Day = 86_400;

    private readonly SampleColumn _values = new(0), _halves = new(0);
    private readonly SpacingFit _fit = new();
    private Spacing? _passed;
    private PrintedDigits? _digits;
    private double _widestHalf, _clock = double.NaN;
    private int _days;
    private readonly bool _keepsAll = keepsAll;
    private bool _keeps = keepsAll;

    /// <summary>How many rows were let go of.</summary>
    private int _passedRows;

    /// <summary>How many rows there are up to the last with a value.</summary>
    public int Rows { get; private set; }

    /// <summary>Half of the widest last digit.</summary>
    public double WidestHalf => Math.Max(_widestHalf, _fit.WidestHalf);

    /// <summary>Makes room for values and for the halves of their last digits, to be written before <see cref="Commit"/>.</summary>
    /// <param name="count">For how many.</param>
    /// <param name="halves">Where the next half goes.</param>
    /// <returns>Where the next value goes.</returns>
    public double* Reserve(int count, out double* halves)
    {
        halves = _halves.Reserve(count) + _halves.Count;
        return _values.Reserve(count) + _values.Count;
    }

    /// <summary>Takes what was written.</summary>
    public void Commit(int count)
    {
        _values.Commit(count);
        _halves.Commit(count);
    }

    /// <summary>Adds one.</summary>
    /// <param name="value">As printed.</param>
    /// <param name="half">Half of its last digit.</param>
    /// <param name="isClock">True for a time of day: where it falls or rises by more than half a day, midnight has passed.</param>
    public void Add(double value, double half, bool isClock)
    {
        if (isClock)
        {
            _days += _clock - value > Day / 2 ? 1 : _clock - value < -Day / 2 ? -1 : 0;
            _clock = value;
            value += _days * Day;
        }
        _values.Add(value);
        _halves.Add(half);
    }

    /// <summary>Called between two parts of the text: fits what came, and lets go of it if it is even.</summary>
    public void EndPart()
    {
        TakeIn();
        if (_keeps)
            return;
        Spacing? spacing = _fit.Fit();
        if (spacing is null && _fit.Count > 1)
        {
            KeepFromHere();
            return;
        }
        _passed = spacing;
        _passedRows += _values.Count;
        _values.Clear();
    }

    /// <summary>The spacing of all; null where they are not evenly spaced.</summary>
    public Spacing? Fit()
    {
        TakeIn();
        return _fit.Fit();
    }

    /// <summary>All the values, those let go of rebuilt from their spacing.</summary>
    public ReadOnlySpan<double> Values()
    {
        TakeIn();
        if (_passedRows > 0)
            KeepFromHere();
        return _values.Values[..Math.Min(Rows, _values.Count)];
    }

    private void TakeIn()
    {
        Span<double> halves = _halves.Values;
        ReadOnlySpan<double> values = _values.Values[(_values.Count - halves.Length)..];
        int first = _passedRows + _values.Count - halves.Length, last = values.LastIndexOfAnyExcept(double.NaN);
        if (last >= 0)
            Rows = first + last + 1;
        if (halves.Length > 0)
            (_digits ??= new PrintedDigits(values, halves)).Correct(values, halves);
        if (!_keepsAll)
            _fit.Add(first, values, halves);
        else
            foreach (double half in halves)
                _widestHalf = Math.Max(_widestHalf, half);
        _halves.Clear();
    }

    private void KeepFromHere()
    {
        _keeps = true;
        if (_passedRows == 0)
            return;
        double[] held = _values.Values.ToArray();
        _values.Clear();
        _values.Reserve(_passedRows + held.Length);
        _values.Commit(_passedRows + held.Length);
        for (int i = 0; i < _passedRows; i++)
            _values.Values[i] = _passed!.Start + i * _passed.Interval;
        held.CopyTo(_values.Values[_passedRows..]);
        _passedRows = 0;
    }
}
