using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>How a reading is held against a limit.</summary>
public enum DecisionRule
{
    /// <summary>Pass only inside the limit by the guard band, fail only beyond it by as much (JCGM 106:2012, clause 8; ISO 14253-1).</summary>
    Guarded,

    /// <summary>Pass or fail on the value alone.</summary>
    Simple,
}

/// <summary>A bound that the person sets on a quantity.</summary>
public sealed record Limit
{
    /// <param name="quantity">The quantity that it judges.</param>
    /// <param name="low">Lower bound in the quantity's base unit; null for none.</param>
    /// <param name="high">Upper bound; null for none.</param>
    /// <exception cref="ArgumentException">No bound, one that is not finite, or low above high.</exception>
    public Limit(Quantity quantity, double? low, double? high)
    {
        ArgumentNullException.ThrowIfNull(quantity);
        if ((low is null && high is null) || (low is { } l && !double.IsFinite(l)) || (high is { } h && !double.IsFinite(h)) || low > high)
            throw new ArgumentException($"not a limit on {quantity}: {low} to {high}");
        (Quantity, Low, High) = (quantity, low, high);
    }

    /// <summary>The quantity that it judges.</summary>
    public Quantity Quantity { get; }

    /// <summary>Lower bound, in the quantity's base unit.</summary>
    public double? Low { get; }

    /// <summary>Upper bound, in the quantity's base unit.</summary>
    public double? High { get; }

    /// <summary>The rule.</summary>
    public DecisionRule Rule { get; init; } = DecisionRule.Guarded;

    /// <summary>Guard band over expanded uncertainty, 0 or more.</summary>
    public double Guard { get; init; } = 1;

    /// <summary>Judges this channel only; null for every channel of the kind.</summary>
    public string? Channel { get; init; }

    /// <summary>True where the bounds are millionths from nominal, of a frequency or a period.</summary>
    public bool IsRelative { get; init; }

    /// <summary>The same limit in the quantity's own unit; null where it is relative and there is no nominal.</summary>
    /// <param name="nominal">Nominal frequency, Hz; null for none.</param>
    public Limit? Against(double? nominal)
    {
        if (!IsRelative)
            return this;
        if (nominal is not { } frequency)
            return null;
        double centre = Quantity == Quantities.Period ? 1 / frequency : frequency;
        return new Limit(Quantity, centre * (1 + Low * 1e-6), centre * (1 + High * 1e-6)) { Rule = Rule, Guard = Guard, Channel = Channel };
    }
}
