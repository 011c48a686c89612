namespace ScopeReader.Readings;

/// <summary>Where the analysers of one channel write what they found, in the order of work.</summary>
public sealed class ReadingSheet
{
    private readonly List<Reading> _readings = [];
    private readonly List<NotMeasured> _notMeasured = [];
    private readonly List<Finding> _findings = [];

    /// <summary>The readings so far.</summary>
    public IReadOnlyList<Reading> Readings => _readings;

    /// <summary>What could not be measured, so far.</summary>
    public IReadOnlyList<NotMeasured> NotMeasured => _notMeasured;

    /// <summary>The findings so far.</summary>
    public IReadOnlyList<Finding> Findings => _findings;

    /// <summary>Writes a reading down.</summary>
    public void Add(Reading reading) => _readings.Add(reading);

    /// <summary>Writes a finding down.</summary>
    public void Add(Finding finding) => _findings.Add(finding);

    /// <summary>Writes down why quantities could not be measured.</summary>
    public void Refuse(string code, string reason, params ReadOnlySpan<Quantity> quantities)
    {
        foreach (Quantity quantity in quantities)
            _notMeasured.Add(new NotMeasured(quantity, code, reason));
    }

    /// <summary>Writes down that a quantity is too small to resolve, and what it lies below: an upper limit can be judged on that.</summary>
    public void RefuseBelow(string code, string reason, double atMost, Quantity quantity) =>
        _notMeasured.Add(new NotMeasured(quantity, code, reason, atMost));

    /// <summary>Writes down that a quantity is too large to resolve, and what it lies above: a lower limit can be judged on that.</summary>
    public void RefuseAbove(string code, string reason, double atLeast, Quantity quantity) =>
        _notMeasured.Add(new NotMeasured(quantity, code, reason, AtLeast: atLeast));

    /// <summary>The primary reading of a quantity, or null.</summary>
    public Reading? Primary(Quantity quantity) => _readings.Find(r => r.IsPrimary && r.Quantity == quantity);
}
