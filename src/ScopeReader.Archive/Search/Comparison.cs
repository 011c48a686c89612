using ScopeReader.Readings;

namespace ScopeReader.Archive.Search;

/// <summary>One bound in a search: <c>frequency-error &gt; 20 ppm</c>, <c>|frequency-error| &lt;= 20 ppm</c>, <c>supply = 5 V</c>.</summary>
public sealed record Comparison
{
    // Longer ones first, or ">=" would read as ">".
    private static readonly string[] Operators = [">=", "<=", ">", "<", "="];

    private Comparison(string name, bool isQuantity, bool isMagnitude, string sign, double value, string unit) =>
        (Name, IsQuantity, IsMagnitude, Operator, Value, Unit) = (name, isQuantity, isMagnitude, sign, value, unit);

    /// <summary>A quantity's identifier, or a condition's name.</summary>
    public string Name { get; }

    /// <summary>True for a quantity.</summary>
    public bool IsQuantity { get; }

    /// <summary>True where the value's sign does not count.</summary>
    public bool IsMagnitude { get; }

    /// <summary>&gt;=, &lt;=, &gt;, &lt; or =.</summary>
    public string Operator { get; }

    /// <summary>The bound, in <see cref="Unit"/>.</summary>
    public double Value { get; }

    /// <summary>The base unit: values in another unit do not match.</summary>
    public string Unit { get; }

    /// <summary>Reads a comparison as a person writes it.</summary>
    /// <param name="text">Name, operator, value with unit.</param>
    /// <param name="comparison">What it says.</param>
    /// <param name="problem">What is wrong, where it is none.</param>
    public static bool TryParse(string text, out Comparison? comparison, out string problem)
    {
        ArgumentNullException.ThrowIfNull(text);
        comparison = null;
        int at = text.AsSpan().IndexOfAny("<>=");
        if (at < 0)
        {
            problem = $"expected a comparison such as \"frequency-error > 20 ppm\", found \"{text}\"";
            return false;
        }
        string name = text[..at].Trim(), sign = Operators.First(o => text.AsSpan(at).StartsWith(o)), value = text[(at + sign.Length)..].Trim();
        bool magnitude = name.Length > 2 && name[0] == '|' && name[^1] == '|';
        if (magnitude)
            name = name[1..^1].Trim();
        if (name.Length == 0)
        {
            problem = $"expected a quantity or a condition before {sign}, found \"{text}\"";
            return false;
        }
        Quantity? quantity = Quantities.Find(name);
        // Levels are in the channel's own unit, and conditions in whatever theirs is.
        if (quantity is null or { Unit: "V" })
        {
            if (!Units.TryParse(value, out double any, out string unit))
            {
                problem = $"expected a number with its unit after {sign}, such as 5 V, found \"{value}\"";
                return false;
            }
            if (quantity is not null && unit.Length == 0)
            {
                problem = $"expected a unit after the number, such as 3.3 V, found \"{value}\"";
                return false;
            }
            comparison = new Comparison(name, quantity is not null, magnitude, sign, any, unit);
            problem = "";
            return true;
        }
        if (!Units.TryParse(value, quantity.Unit, out double bound, out problem))
            return false;
        comparison = new Comparison(name, true, magnitude, sign, bound, quantity.Unit);
        return true;
    }
}
