using ScopeReader.Captures;

namespace ScopeReader.Files;

/// <summary>A file that was read: the capture, and how it was understood.</summary>
/// <param name="Capture">What was captured.</param>
/// <param name="Report">How the file was understood.</param>
public sealed record CaptureFile(Capture Capture, ImportReport Report);
