using System.Diagnostics;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.ImportFuzz;

/// <summary>What became of one file.</summary>
/// <param name="Refusal">The message, where it was refused; null where it was read.</param>
/// <param name="Fault">What broke; null where nothing did.</param>
/// <param name="Seconds">How long it took.</param>
/// <param name="Allocated">Bytes allocated by the reading thread.</param>
public sealed record Trial(string? Refusal, Exception? Fault, double Seconds, long Allocated)
{
    /// <summary>Longer than this is a hang, s.</summary>
    public const double Patience = 20;

    /// <summary>The most that a file of a megabyte may take, bytes.</summary>
    public const long MostAllocated = 200L << 20;

    /// <summary>Reads a file and notes how it ended.</summary>
    public static Trial Of(byte[] file)
    {
        long before = GC.GetAllocatedBytesForCurrentThread();
        long start = Stopwatch.GetTimestamp();
        (string? refusal, Exception? fault) = Read(file);
        return new Trial(refusal, fault, Stopwatch.GetElapsedTime(start).TotalSeconds, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    /// <summary>What is wrong with how it ended; null where nothing is.</summary>
    public string? Complaint =>
        Fault is not null ? $"broke: {Fault.GetType().Name}: {Fault.Message}"
        : Seconds > Patience ? FormattableString.Invariant($"took {Seconds:F1} s")
        : Allocated > MostAllocated ? FormattableString.Invariant($"allocated {Allocated >> 20} MB")
        : Refusal is { } message && (message.Length > 600 || message.Any(char.IsControl)) ? "refused in a message that is not one short line"
        : null;

    private static (string? Refusal, Exception? Fault) Read(byte[] file)
    {
        try
        {
            CaptureFile read = CaptureReader.Read(new MemoryStream(file), "made.csv", ImportSettings.Automatic);
            return (read.Capture.Channels.Count > 0 ? null : "no channels", null);
        }
        catch (ImportException refusal)
        {
            return (refusal.Message, null);
        }
        catch (Exception fault) when (fault is not OutOfMemoryException)
        {
            return (null, fault);
        }
    }
}
