namespace ScopeReader.Signals;

/// <summary>A line of a made spectrum.</summary>
/// <param name="Frequency">Hz.</param>
/// <param name="PowerDbm">Its power.</param>
public sealed record SpectrumLine(double Frequency, double PowerDbm);
