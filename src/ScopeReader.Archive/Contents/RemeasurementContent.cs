namespace ScopeReader.Archive.Contents;

/// <summary>What a record of kind <c>measurement</c> holds: a later measurement of a kept capture.</summary>
/// <param name="By">Who measured again.</param>
/// <param name="Reason">Why.</param>
/// <param name="Measurement">What came out.</param>
public sealed record RemeasurementContent(string By, string Reason, MeasurementContent Measurement);
