namespace ScopeReader.Files;

/// <summary>How a channel was understood.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Kind">"waveform" or "spectrum".</param>
/// <param name="Unit">Unit of the values, without prefix; empty where unknown.</param>
/// <param name="Segment">Number of its segment, from 1.</param>
/// <param name="Samples">How many samples are measured.</param>
/// <param name="Minimum">The smallest.</param>
/// <param name="Maximum">The largest.</param>
/// <param name="Clipped">Samples that look held at the edge of the instrument's range.</param>
/// <param name="Missing">Samples that were empty, over range or not a number, kept out.</param>
public sealed record ChannelReport(string Name, string Kind, string Unit, int Segment, int Samples, double Minimum, double Maximum, int Clipped, int Missing);
