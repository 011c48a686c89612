using System.Text.Json;
using ScopeReader.Archive;
using ScopeReader.Archive.Contents;
using ScopeReader.Files;
using ScopeReader.Files.Output;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands.Archive;

/// <summary>A file that was read once, its bytes and what was measured on just these.</summary>
/// <param name="Name">As the person named it.</param>
/// <param name="Bytes">Its bytes.</param>
/// <param name="Date">When it was last written.</param>
/// <param name="Plan">The plan, with what the command line says in it.</param>
/// <param name="Measurement">What was measured.</param>
/// <param name="Context">What the measurement came from.</param>
internal sealed record KeptFile(string Name, byte[] Bytes, DateTimeOffset Date, Plan Plan, Measurement Measurement, MeasurementContext Context)
{
    /// <summary>Reads and measures a file.</summary>
    /// <exception cref="ImportException">It cannot be read.</exception>
    public static KeptFile Read(string file, Plan plan, string? planText, string? channel, CancellationToken cancellation)
    {
        byte[] bytes;
        DateTimeOffset date = DateTimeOffset.UtcNow;
        if (file == "-")
        {
            using var copy = new MemoryStream();
            using Stream input = Console.OpenStandardInput();
            input.CopyTo(copy);
            bytes = copy.ToArray();
        }
        else
        {
            (bytes, date) = ReadFile(file);
        }
        string name = file == "-" ? "standard input" : file;
        ImportTable memory = file == "-" ? ImportTable.Empty : FolderMemory.For(file);
        (Measurement measurement, ImportReport report) = CaptureMeasurer.Measure(bytes, name, plan, memory, channel, cancellation);
        plan = plan with { Import = plan.Import.Or(memory.Settings) };
        return new KeptFile(name, bytes, date, plan, measurement, ContextOf(plan, planText, channel, report));
    }

    /// <summary>What a measurement came from.</summary>
    public static MeasurementContext ContextOf(Plan plan, string? planText, string? channel, ImportReport report)
    {
        var inspection = new InspectionJson(CommandLine.ProgramAndVersion);
        inspection.Add(report);
        using JsonDocument document = JsonDocument.Parse(inspection.Document());
        return new MeasurementContext
        {
            Program = CommandLine.ProgramAndVersion,
            PlanText = planText,
            Settings = new MeasurementSettings { Nominal = plan.Nominal, Channel = channel, Interval = plan.Import.Interval, Segment = plan.Import.Segment, HowRead = ImportTable.TextOf(plan.Import), AsOf = plan.AsOf },
            Chain = plan.Chain,
            Import = document.RootElement.GetProperty("captures")[0].Clone(),
        };
    }

    // A capture is read whole here: its bytes are what is kept.
    private static (byte[] Bytes, DateTimeOffset Date) ReadFile(string file)
    {
        try
        {
            return (File.ReadAllBytes(file), File.GetLastWriteTimeUtc(file));
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new ImportException(file, "expected a file, found none of that name. Check the name and the folder.", cause: e);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw new ImportException(file, Directory.Exists(file) ? "expected a file, found a folder. Name a file in it." : $"expected a file that may be read, found: {e.Message}", cause: e);
        }
    }
}
