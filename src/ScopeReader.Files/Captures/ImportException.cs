namespace ScopeReader.Files;

/// <summary>A file that could not be read as a capture. The message is one line: where, what was expected, what was found, what to do.</summary>
public sealed class ImportException : Exception
{
    /// <param name="file">The file as the person named it.</param>
    /// <param name="problem">What was expected, what was found and what to do; a sentence without the place.</param>
    /// <param name="line">Line number from 1, where one line is to blame.</param>
    /// <param name="column">Column number from 1, where one cell is.</param>
    /// <param name="cause">What the system said, where it said something.</param>
    public ImportException(string file, string problem, long? line = null, int? column = null, Exception? cause = null)
        : base(Sentence(file, problem, line, column), cause) => (File, Line, Column) = (file, line, column);

    /// <summary>The file as the person named it.</summary>
    public string File { get; }

    /// <summary>Line number from 1; null where the whole file is meant.</summary>
    public long? Line { get; }

    /// <summary>Column number from 1; null where a whole line is meant.</summary>
    public int? Column { get; }

    private static string Sentence(string file, string problem, long? line, int? column)
    {
        string place = Excerpt.Of(file, 200);
        if (line is { } l)
            place += FormattableString.Invariant($", line {l}");
        if (column is { } c)
            place += FormattableString.Invariant($", column {c}");
        return $"{place}: {problem}";
    }
}
