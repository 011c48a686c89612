namespace ScopeReader.Bench.Drawing;

/// <summary>What a cell means. How that looks (colour, weight, or weight alone) is the theme's business.</summary>
internal enum Ink : byte
{
    /// <summary>What is read first.</summary>
    Plain,

    /// <summary>What is there when looked for: axes, units, methods.</summary>
    Quiet,

    /// <summary>Titles, and the row that is selected.</summary>
    Strong,

    /// <summary>The samples.</summary>
    Trace,

    /// <summary>What the program adds to the samples: levels, harmonics, keys.</summary>
    Accent,

    /// <summary>A limit.</summary>
    Bound,

    /// <summary>The verdict pass.</summary>
    Pass,

    /// <summary>The verdict fail, and files that cannot be read.</summary>
    Fail,

    /// <summary>The verdict undecided.</summary>
    Undecided,
}
