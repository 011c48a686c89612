namespace ScopeReader.Files.Structure;

/// <summary>A line has more cells than any table of samples.</summary>
internal sealed class TooWideException : Exception
{
    /// <param name="line">Index of the line among those looked at.</param>
    public TooWideException(int line) : base("too many cells") => Line = line;

    /// <summary>Index of the line among those looked at.</summary>
    public int Line { get; }
}
