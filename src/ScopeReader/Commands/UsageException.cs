namespace ScopeReader.Commands;

/// <summary>The command line is wrong; the message says how, in one line without a full stop.</summary>
internal sealed class UsageException(string message) : Exception(message);
