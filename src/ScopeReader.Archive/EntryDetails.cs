namespace ScopeReader.Archive;

/// <summary>What a person states of an entry, and may correct later.</summary>
public sealed record EntryDetails
{
    /// <summary>Nothing is stated.</summary>
    public static EntryDetails None { get; } = new();

    /// <summary>What was measured.</summary>
    public string? Subject { get; init; }

    /// <summary>Its serial number.</summary>
    public string? Serial { get; init; }

    /// <summary>Who measured.</summary>
    public string? Operator { get; init; }

    /// <summary>With what.</summary>
    public string? Instrument { get; init; }

    /// <summary>The day the instrument's calibration runs out.</summary>
    public DateOnly? CalibrationDue { get; init; }

    /// <summary>Anything worth keeping.</summary>
    public string? Notes { get; init; }

    /// <summary>Words to find it by, each once, in order.</summary>
    public IReadOnlyList<string> Tags { get; init; } = [];

    /// <summary>Named conditions, in the order of their names.</summary>
    public IReadOnlyDictionary<string, Condition> Conditions { get; init; } = new SortedDictionary<string, Condition>(StringComparer.Ordinal);

    /// <summary>What a plan states.</summary>
    public static EntryDetails From(Plan plan)
    {
        ArgumentNullException.ThrowIfNull(plan);
        return new EntryDetails
        {
            Subject = plan.Subject,
            Serial = plan.Serial,
            Operator = plan.Operator,
            Instrument = plan.Chain.Instrument,
            CalibrationDue = plan.Chain.CalibrationDue,
            Notes = plan.Notes,
            Conditions = new SortedDictionary<string, Condition>(plan.Conditions.ToDictionary(), StringComparer.Ordinal),
        };
    }
}
