using System.Globalization;
using System.Runtime.CompilerServices;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.Files.Output;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands;

/// <summary>The one place that turns a file and a plan into a measurement; every verb measures through it.</summary>
internal static class CaptureMeasurer
{
    /// <summary>Reads and measures a file.</summary>
    /// <param name="file">The file as the person named it.</param>
    /// <param name="plan">The plan, with what the command line says in it.</param>
    /// <param name="channel">Measure only this channel; null for all.</param>
    /// <param name="progress">Is told how far it is; null for nobody.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The measurement, or why the file could not be read.</returns>
    public static MeasuredFile Measure(string file, Plan plan, string? channel, ProgressLine? progress, CancellationToken cancellation)
    {
        try
        {
            Capture capture = Read(file, plan, channel, progress, cancellation);
            return new MeasuredFile(capture.File, Analysis.Measure(capture, plan, progress?.Measuring(file), cancellation), null);
        }
        catch (ImportException e)
        {
            return new MeasuredFile(e.File, null, e.Message);
        }
    }

    /// <summary>Measures bytes that are in memory.</summary>
    /// <param name="bytes">A file's bytes.</param>
    /// <param name="file">Its name.</param>
    /// <param name="plan">The plan, with what the command line says in it.</param>
    /// <param name="memory">What the file's folder remembers.</param>
    /// <param name="channel">Measure only this channel; null for all.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The measurement, and how the bytes were read.</returns>
    /// <exception cref="ImportException">They are no capture.</exception>
    public static (Measurement Measurement, ImportReport Report) Measure(byte[] bytes, string file, Plan plan, ImportTable memory, string? channel, CancellationToken cancellation)
    {
        CaptureFile read = CaptureReader.Read(new MemoryStream(bytes, writable: false), file, plan.Import, memory, plan.Chain.Scale, cancellation);
        return (Analysis.Measure(Chosen(read.Capture, file, plan, channel), plan, null, cancellation), read.Report);
    }

    /// <summary>Measures several files, at most so many at a time.</summary>
    /// <param name="files">The files.</param>
    /// <param name="measure">Measures one.</param>
    /// <param name="jobs">How many at a time, 1 or more.</param>
    /// <param name="inOrder">True for the files' order, false for that in which they finish.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static async IAsyncEnumerable<MeasuredFile> MeasureAll(IReadOnlyList<string> files, Func<string, MeasuredFile> measure, int jobs, bool inOrder,
        [EnumeratorCancellation] CancellationToken cancellation)
    {
        // No more than the jobs are ever held: a capture may be as large as the memory allows.
        var running = new List<Task<MeasuredFile>>();
        for (int next = 0; next < files.Count || running.Count > 0;)
        {
            while (running.Count < jobs && next < files.Count)
            {
                string file = files[next++];
                running.Add(Task.Run(() => measure(file), cancellation));
            }
            Task<MeasuredFile> done = inOrder ? running[0] : await Task.WhenAny(running);
            running.Remove(done);
            yield return await done;
        }
    }

    private static Capture Read(string file, Plan plan, string? channel, ProgressLine? progress, CancellationToken cancellation) =>
        Chosen(CaptureReader.Read(file, plan.Import, plan.Chain.Scale, progress?.Reading(file), cancellation).Capture, file, plan, channel);

    private static Capture Chosen(Capture capture, string file, Plan plan, string? channel)
    {
        if (channel is not null)
        {
            Channel[] chosen = [.. capture.Channels.Where(c => c.Name == channel)];
            if (chosen.Length == 0)
                throw new ImportException(file, $"expected a channel \"{channel}\", found {string.Join(", ", capture.Channels.Select(c => c.Name))}. Name one of these with --channel.");
            capture = capture with { Channels = chosen };
        }
        return plan is { Chain.CalibrationDue: { } due, AsOf: { } today } && due < today
            ? capture with { Doubts = [.. capture.Doubts, string.Create(CultureInfo.InvariantCulture, $"the instrument's calibration ran out on {due:yyyy-MM-dd}, by the plan")] }
            : capture;
    }
}
