namespace ScopeReader.Readings;

/// <summary>A quantity's value, its uncertainty, and the method that gave it.</summary>
public sealed record Reading
{
    /// <param name="quantity">What was measured.</param>
    /// <param name="value">In <paramref name="unit"/>; finite.</param>
    /// <param name="unit">The quantity's base unit, the channel's own unit for levels, or sample and 1/sample without an interval.</param>
    /// <param name="budget">The uncertainty, chain terms included.</param>
    /// <param name="method">The method's name, kebab-case: <c>crossings</c>.</param>
    /// <exception cref="ArgumentException">The value is not finite.</exception>
    public Reading(Quantity quantity, double value, string unit, Budget budget, string method)
    {
        ArgumentNullException.ThrowIfNull(quantity);
        ArgumentNullException.ThrowIfNull(budget);
        if (!double.IsFinite(value))
            throw new ArgumentException($"{quantity} is not finite", nameof(value));
        (Quantity, Value, Unit, Budget, Method) = (quantity, value, unit, budget, method);
    }

    /// <summary>What was measured.</summary>
    public Quantity Quantity { get; }

    /// <summary>The value, in <see cref="Unit"/>.</summary>
    public double Value { get; }

    /// <summary>Unit of the value and of its uncertainty.</summary>
    public string Unit { get; }

    /// <summary>The uncertainty and what it is made of.</summary>
    public Budget Budget { get; }

    /// <summary>The method's name.</summary>
    public string Method { get; }

    /// <summary>True for the one reading of a quantity that limits judge.</summary>
    public bool IsPrimary { get; init; } = true;

    /// <summary>How many edges, cycles or points the value rests on; null where that says nothing.</summary>
    public int? Count { get; init; }

    /// <summary>What an ideal wave of the measured shape would have, in <see cref="Unit"/>; null where nothing is expected.</summary>
    public double? Expected { get; init; }

    /// <summary>What the person should know beside the number: the settings behind it, or why it is the primary one.</summary>
    public string? Note { get; init; }
}
