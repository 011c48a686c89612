namespace ScopeReader.Readings;

/// <summary>How the values that could be attributed to a term are spread.</summary>
public enum Distribution
{
    /// <summary>Normal, or a mean of enough to be (JCGM 100 4.3.4).</summary>
    Normal,

    /// <summary>Anywhere inside a bound, equally likely (JCGM 100 4.3.7).</summary>
    Rectangular,
}
