namespace ScopeReader.Captures;

/// <summary>One file as saved by an instrument.</summary>
/// <param name="File">The file's name as the person gave it.</param>
/// <param name="Sha256">Hash of the file's bytes, lower-case hexadecimal.</param>
/// <param name="Channels">Its channels, in the file's order.</param>
/// <param name="Doubts">What the reader had to assume or noticed, a sentence each.</param>
public sealed record Capture(string File, string Sha256, IReadOnlyList<Channel> Channels, IReadOnlyList<string> Doubts);
