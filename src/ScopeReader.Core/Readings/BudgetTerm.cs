namespace ScopeReader.Readings;

/// <summary>One line of an uncertainty budget (JCGM 100:2008, 5.1.2).</summary>
public sealed record BudgetTerm
{
    /// <summary>A term that is known by its spread.</summary>
    /// <param name="name">What it comes from: <c>noise</c>, <c>timebase</c>.</param>
    /// <param name="standardUncertainty">In the unit of the input, 0 or more.</param>
    /// <param name="sensitivity">Change of the reading with the input.</param>
    /// <param name="degreesOfFreedom">Of a type A estimate; null where there are too many to matter, or it is no estimate.</param>
    /// <param name="ofChain">True where captures that share the chain share the error.</param>
    public static BudgetTerm Normal(string name, double standardUncertainty, double sensitivity = 1, double? degreesOfFreedom = null, bool ofChain = false) =>
        new(name, standardUncertainty, Distribution.Normal, sensitivity, degreesOfFreedom, ofChain);

    /// <summary>A term that is known by its bound.</summary>
    /// <param name="name">What it comes from.</param>
    /// <param name="halfWidth">The bound, in the unit of the input, 0 or more.</param>
    /// <param name="sensitivity">Change of the reading with the input.</param>
    /// <param name="ofChain">True where captures that share the chain share the error.</param>
    public static BudgetTerm Rectangular(string name, double halfWidth, double sensitivity = 1, bool ofChain = false) =>
        new(name, halfWidth / Math.Sqrt(3), Distribution.Rectangular, sensitivity, null, ofChain);

    private BudgetTerm(string name, double value, Distribution distribution, double sensitivity, double? degreesOfFreedom, bool ofChain)
    {
        ArgumentException.ThrowIfNullOrEmpty(name);
        if (!double.IsFinite(value) || value < 0 || !double.IsFinite(sensitivity))
            throw new ArgumentException($"not a budget term: {name}, {value} × {sensitivity}");
        (Name, Value, Distribution, Sensitivity, DegreesOfFreedom, OfChain) = (name, value, distribution, sensitivity, degreesOfFreedom, ofChain);
    }

    /// <summary>What the term comes from.</summary>
    public string Name { get; private init; }

    /// <summary>Standard uncertainty of the input, in its unit.</summary>
    public double Value { get; private init; }

    /// <summary>How its values are spread.</summary>
    public Distribution Distribution { get; private init; }

    /// <summary>Change of the reading with the input.</summary>
    public double Sensitivity { get; private init; }

    /// <summary>Degrees of freedom; null means as good as infinitely many.</summary>
    public double? DegreesOfFreedom { get; private init; }

    /// <summary>True for a term of the measuring chain, which captures with that chain share.</summary>
    public bool OfChain { get; private init; }

    /// <summary>Standard uncertainty that the term gives the reading, in the reading's unit.</summary>
    public double Contribution => Math.Abs(Sensitivity) * Value;

    /// <summary>The same term for a reading that is this one times a factor.</summary>
    public BudgetTerm Times(double factor) => this with { Sensitivity = Sensitivity * factor };
}
