namespace ScopeReader.Bench.Work;

/// <summary>How far a file has come.</summary>
internal enum CaptureStage
{
    /// <summary>In the queue.</summary>
    Waiting,

    /// <summary>Being read.</summary>
    Reading,

    /// <summary>Read; being measured.</summary>
    Measuring,

    /// <summary>Measured.</summary>
    Measured,

    /// <summary>Could not be read or measured.</summary>
    Unreadable,
}
