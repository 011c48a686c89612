using System.Globalization;

namespace ScopeReader.Files.Plans;

/// <summary>A plan that cannot be used, and where it is wrong.</summary>
public sealed class PlanException : Exception
{
    /// <param name="file">The plan's name as the person gave it.</param>
    /// <param name="line">Number of the line, from 1; null where the file as a whole is meant.</param>
    /// <param name="problem">What was expected, what was found, what to do; without the place.</param>
    public PlanException(string file, int? line, string problem)
        : base(line is { } n ? string.Create(CultureInfo.InvariantCulture, $"{file}, line {n}: {problem}") : $"{file}: {problem}") =>
        (File, Line, Problem) = (file, line, problem);

    /// <summary>The plan's name as the person gave it.</summary>
    public string File { get; }

    /// <summary>Number of the line, from 1; null where the file as a whole is meant.</summary>
    public int? Line { get; }

    /// <summary>The message without the place.</summary>
    public string Problem { get; }
}
