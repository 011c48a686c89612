using ScopeReader.Archive;

namespace ScopeReader.ArchiveTrials;

/// <summary>Adds entries one after another, several at a time, and says so once each is acknowledged.</summary>
internal static class Adder
{
    private const int Samples = 500;

    public static int Run(string path, int count, int seed)
    {
        var random = new Random(seed);
        using MeasurementArchive archive = MeasurementArchive.Open(path, TimeSpan.FromMinutes(2));
        int first = random.Next(1_000_000) * 1000;
        for (int done = 0; done < count;)
        {
            NewEntry[] entries = [.. Enumerable.Range(first + done, Math.Min(random.Next(1, 6), count - done)).Select(s => MadeCapture.Entry(s, Samples))];
            IReadOnlyList<Added> added = archive.Add(entries);
            for (int i = 0; i < entries.Length; i++)
                Console.WriteLine(FormattableString.Invariant($"{added[i].Entry} {entries[i].Measurement.Capture.Sha256}"));
            Console.Out.Flush();
            done += entries.Length;
        }
        return 0;
    }
}
