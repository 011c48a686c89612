namespace ScopeReader.Archive.Contents;

/// <summary>What a record of kind <c>amendment</c> holds.</summary>
/// <param name="By">Who corrected.</param>
/// <param name="Reason">Why.</param>
/// <param name="Changes">What: at least one.</param>
public sealed record AmendmentContent(string By, string Reason, IReadOnlyList<Change> Changes);
