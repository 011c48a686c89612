namespace ScopeReader.Bench.Pages;

/// <summary>What the lower part of the main page shows.</summary>
internal enum Panel
{
    /// <summary>Readings and verdicts.</summary>
    Readings,

    /// <summary>Findings, doubts and cautions.</summary>
    Findings,

    /// <summary>What the capture does not support, and why.</summary>
    NotMeasured,
}
