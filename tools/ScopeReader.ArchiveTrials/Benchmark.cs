using System.Diagnostics;
using ScopeReader.Archive;
using ScopeReader.Archive.Packing;
using ScopeReader.Archive.Search;

namespace ScopeReader.ArchiveTrials;

/// <summary>Times what a person waits for.</summary>
internal static class Benchmark
{
    public static int Run(string path)
    {
        using (MeasurementArchive archive = MeasurementArchive.OpenToRead(path))
        {
            ArchiveStats stats = archive.Stats();
            Console.WriteLine(FormattableString.Invariant($"{stats.Entries} entries, {stats.FileBytes / 1e6:F0} MB"));
            Find(archive, "by subject", new ArchiveQuery { Subject = "if source, board 42" });
            Find(archive, "by subject, *", new ArchiveQuery { Subject = "*board 7" });
            Find(archive, "by serial, *", new ArchiveQuery { Serial = "S0420*" });
            Find(archive, "by quantity range", new ArchiveQuery { Where = [Where("frequency-error > 99.1 ppm")] });
            Find(archive, "by quantity and subject", new ArchiveQuery { Subject = "IF source, board 42", Where = [Where("|frequency-error| > 20 ppm")] });
            Find(archive, "by two quantities", new ArchiveQuery { Where = [Where("frequency-error > 90 ppm"), Where("rise-time < 1.2 s")] });
            Find(archive, "by text", new ArchiveQuery { Text = "board 042000*" });
            Find(archive, "by day", new ArchiveQuery { Since = new DateTimeOffset(2022, 1, 1, 0, 0, 0, TimeSpan.Zero), Until = new DateTimeOffset(2022, 1, 10, 0, 0, 0, TimeSpan.Zero) });
            Find(archive, "half of them all", new ArchiveQuery { Where = [Where("frequency-error > 0 ppm")] });
        }
        Add(path);
        Pack();
        return 0;
    }

    private static Comparison Where(string text) => Comparison.TryParse(text, out Comparison? comparison, out string problem) ? comparison! : throw new ArgumentException(problem);

    private static void Find(MeasurementArchive archive, string what, ArchiveQuery query)
    {
        long matches = archive.Find(query).Matches;
        var times = new double[9];
        TimeSpan before = Environment.CpuUsage.TotalTime;
        for (int i = 0; i < times.Length; i++)
        {
            var watch = Stopwatch.StartNew();
            archive.Find(query);
            times[i] = watch.Elapsed.TotalMilliseconds;
        }
        double busy = (Environment.CpuUsage.TotalTime - before).TotalMilliseconds / times.Length;
        Array.Sort(times);
        Console.WriteLine(FormattableString.Invariant($"find {what}: {matches} matches, first 100 in {times[4]:F1} ms (median of 9; {busy:F1} ms of processor each)"));
    }

    // What adding a capture takes, part by part, on one thread.
    private static void Parts(NewEntry[] entries)
    {
        double Each(Action<NewEntry> work)
        {
            work(entries[0]);
            var watch = Stopwatch.StartNew();
            foreach (NewEntry entry in entries.AsSpan(0, 200))
                work(entry);
            return watch.Elapsed.TotalMilliseconds / 200;
        }
        double hash = Each(e => System.Security.Cryptography.SHA256.HashData(e.Bytes.Span)), pack = Each(e => CapturePacker.Pack(e.Bytes.Span)), prepare = Each(e => MeasurementArchive.Prepare([e]));
        Console.WriteLine(FormattableString.Invariant($"of that, one thread: hash {hash:F2} ms, pack {pack:F2} ms, all that needs no archive {prepare:F2} ms a capture"));
    }

    // The captures are made and counted as measured beforehand: what is timed is what the archive does with them.
    private static void Add(string path)
    {
        const int Count = 1000, Samples = 10_000, BatchSize = 50;
        using MeasurementArchive archive = MeasurementArchive.Open(path);
        int first = (int)archive.Stats().Entries;
        NewEntry[] entries = [.. Enumerable.Range(first, Count).Select(s => MadeCapture.Entry(s, Samples))];
        long bytes = entries.Sum(e => (long)e.Bytes.Length);
        archive.Add(MadeCapture.Entry(first + Count, Samples));
        TimeSpan before = Environment.CpuUsage.TotalTime;
        var watch = Stopwatch.StartNew();
        // The next batch is made ready while one is written.
        Task<PreparedEntries> Ready(int from) => Task.Run(() => MeasurementArchive.Prepare(entries[from..(from + BatchSize)]));
        Task<PreparedEntries> next = Ready(0);
        for (int i = 0; i < Count; i += BatchSize)
        {
            PreparedEntries ready = next.GetAwaiter().GetResult();
            if (i + BatchSize < Count)
                next = Ready(i + BatchSize);
            archive.Add(ready);
        }
        double seconds = watch.Elapsed.TotalSeconds, busy = (Environment.CpuUsage.TotalTime - before).TotalSeconds;
        Console.WriteLine(FormattableString.Invariant(
            $"add {Count} measured captures of {Samples} samples ({bytes / 1e6:F0} MB) to {first} entries, {BatchSize} a transaction: {seconds:F2} s ({busy:F2} s of processor), {Count / seconds:F0} a second"));
        Parts(entries);
    }

    private static void Pack()
    {
        Pack("10 digits", "0.000000000e+00", "0.000e+00");
        Pack("as few digits as give it back", "R", "R");
        Pack("17 digits", "G17", "G17");
        Pack("19 digits", "E18", "E18");
    }

    private static void Pack(string what, string time, string value)
    {
        (byte[] bytes, _) = MadeCapture.Text(1, 1_000_000, time, value);
        CapturePacker.Pack(bytes);
        var watch = Stopwatch.StartNew();
        byte[] packed = CapturePacker.Pack(bytes);
        double packing = watch.Elapsed.TotalMilliseconds;
        watch.Restart();
        bool same = CapturePacker.Unpack(packed).AsSpan().SequenceEqual(bytes);
        Console.WriteLine(FormattableString.Invariant(
            $"pack 1,000,000 samples of 8 bits, {what}: {bytes.Length} bytes to {packed.Length} ({100.0 * packed.Length / bytes.Length:F2} %) in {packing:F0} ms, back in {watch.Elapsed.TotalMilliseconds:F0} ms, the same bytes: {(same ? "yes" : "no")}"));
    }
}
