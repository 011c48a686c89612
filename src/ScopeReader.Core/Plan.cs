using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Limits;

namespace ScopeReader;

/// <summary>The person's own file: subject, nominal frequency, measuring chain, reference levels, limits.</summary>
public sealed record Plan
{
    /// <summary>A plan that says nothing.</summary>
    public static Plan Empty { get; } = new();

    /// <summary>What is measured.</summary>
    public string? Subject { get; init; }

    /// <summary>Its serial number.</summary>
    public string? Serial { get; init; }

    /// <summary>Who measures.</summary>
    public string? Operator { get; init; }

    /// <summary>Anything worth keeping.</summary>
    public string? Notes { get; init; }

    /// <summary>Nominal frequency, Hz.</summary>
    public double? Nominal { get; init; }

    /// <summary>Judge only this channel; null for all.</summary>
    public string? Channel { get; init; }

    /// <summary>What stood between the circuit and the numbers.</summary>
    public MeasuringChain Chain { get; init; } = MeasuringChain.Unknown;

    /// <summary>Reference levels and regions.</summary>
    public LevelSettings Levels { get; init; } = LevelSettings.Default;

    /// <summary>How to read the file, where the person says so.</summary>
    public ImportSettings Import { get; init; } = ImportSettings.Automatic;

    /// <summary>Named conditions of the measurement.</summary>
    public IReadOnlyDictionary<string, Condition> Conditions { get; init; } = new Dictionary<string, Condition>();

    /// <summary>The limits.</summary>
    public IReadOnlyList<Limit> Limits { get; init; } = [];

    /// <summary>The limit lines for spectrum traces.</summary>
    public IReadOnlyList<LimitLine> LimitLines { get; init; } = [];

    /// <summary>True where something is to be judged.</summary>
    public bool HasLimits => Limits.Count + LimitLines.Count > 0;

    /// <summary>The day that ageing is counted to; null where nobody asked.</summary>
    public DateOnly? AsOf { get; init; }
}

/// <summary>A named condition: a value with its unit.</summary>
/// <param name="Value">In <paramref name="Unit"/>, without prefix.</param>
/// <param name="Unit">The unit.</param>
public sealed record Condition(double Value, string Unit);
