using ScopeReader.Files.Output;

namespace ScopeReader.Commands;

/// <summary>A form of <c>measure</c>'s results.</summary>
internal interface IMeasureOutput
{
    /// <summary>True to be given the files in the order they were named, false in that in which they finish.</summary>
    bool InOrder { get; }

    /// <summary>Writes a file, or keeps it for the end.</summary>
    void Write(MeasuredFile file);

    /// <summary>No more files come.</summary>
    void Finish();
}
