using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>A quantity on two sides, and what is known of their difference.</summary>
/// <param name="Quantity">The quantity.</param>
/// <param name="Unit">Unit of both values and of their difference.</param>
/// <param name="File">The compared side's first file.</param>
/// <param name="Channel">The compared channel.</param>
/// <param name="Reference">Value of the reference; the mean of its captures.</param>
/// <param name="Value">Value of the compared side; the mean of its captures.</param>
/// <param name="Budget">Uncertainty of the difference.</param>
/// <param name="ReferenceCount">Captures behind <paramref name="Reference"/>.</param>
/// <param name="Count">Captures behind <paramref name="Value"/>.</param>
public sealed record Difference(Quantity Quantity, string Unit, string File, string Channel, double Reference, double Value, Budget Budget,
    int ReferenceCount, int Count)
{
    /// <summary>Value less reference.</summary>
    public double Change => Value - Reference;

    /// <summary>Unit of the difference as people write it: levels in dB to any reference differ in dB.</summary>
    public string ChangeUnit => Unit.StartsWith("dB", StringComparison.Ordinal) ? "dB" : Unit;

    /// <summary>Whether the difference is beyond its 95 % interval; null where a chain term that it depends on is unknown.</summary>
    public bool? IsSignificant => Budget.Missing.Count > 0 ? null : Math.Abs(Change) > Budget.ExpandedUncertainty;

    /// <summary>Value over reference; null where that says nothing: levels in dB, ppm, a sign that changes.</summary>
    public double? Ratio =>
        Unit is "ppm" or "ppm/s" || Unit.StartsWith("dB", StringComparison.Ordinal) || !(Value / Reference is > 0 and < 1e6) ? null : Value / Reference;
}
