using ScopeReader.Archive;
using ScopeReader.ArchiveTrials;

namespace ScopeReader.Tests.Archive;

/// <summary>A folder of its own for a test, and entries to put into archives there.</summary>
public sealed class Fixture : IDisposable
{
    public Fixture()
    {
        Folder = Path.Combine(Path.GetTempPath(), "scopereader-archive-" + Guid.NewGuid().ToString("N"));
        Directory.CreateDirectory(Folder);
    }

    public string Folder { get; }

    public string File => Path.Combine(Folder, "archive.db");

    public string In(string name) => Path.Combine(Folder, name);

    public MeasurementArchive Open() => MeasurementArchive.Open(File, TimeSpan.FromSeconds(30));

    /// <summary>An archive of a few entries with some history; closed again.</summary>
    public string Filled(int entries = 5)
    {
        using MeasurementArchive archive = Open();
        archive.Add([.. Enumerable.Range(0, entries).Select(s => Entry(s))]);
        archive.Amend(2, [new("subject", null, "Reference source")], "tester", "it was another board");
        NewEntry first = Entry(0);
        archive.Keep(1, first.Measurement, first.Context with { Program = "a later version" }, "tester", "new release");
        return archive.Head;
    }

    public static NewEntry Entry(int seed) => MadeCapture.Entry(seed, 300);

    public void Dispose() => Directory.Delete(Folder, recursive: true);
}
