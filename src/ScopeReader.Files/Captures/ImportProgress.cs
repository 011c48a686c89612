namespace ScopeReader.Files;

/// <summary>How far the reading of a file is.</summary>
/// <param name="BytesRead">Bytes of the file that were read.</param>
/// <param name="BytesInAll">The file's size; null where it is not known, as of a pipe.</param>
public readonly record struct ImportProgress(long BytesRead, long? BytesInAll);
