using System.Collections.Concurrent;
using System.Diagnostics;
using System.Globalization;
using System.Security.Cryptography;
using ScopeReader.Archive;

namespace ScopeReader.ArchiveTrials;

/// <summary>Kills a program that adds to an archive, again and again, and looks for what it had acknowledged.</summary>
public static class KillLoop
{
    /// <summary>What came of it.</summary>
    /// <param name="Kills">How many were killed while they ran.</param>
    /// <param name="Acknowledged">Entries acknowledged in all.</param>
    /// <param name="Lost">Of these, how many the archive does not have, byte for byte.</param>
    /// <param name="Damages">What a check of the whole archive found wrong at the end.</param>
    public sealed record Outcome(int Kills, int Acknowledged, int Lost, int Damages);

    /// <summary>Runs it.</summary>
    /// <param name="path">An archive, made by the first run.</param>
    /// <param name="runs">How many times.</param>
    /// <param name="seed">When to kill: the same seed, the same delays.</param>
    /// <param name="log">Where a line every twenty runs goes.</param>
    public static Outcome Run(string path, int runs, int seed, TextWriter log)
    {
        var random = new Random(seed);
        var acknowledged = new ConcurrentDictionary<int, string>();
        int kills = 0, lost = 0;
        for (int run = 1; run <= runs; run++)
        {
            if (KillOnce(path, seed * 10_000 + run, random, acknowledged))
                kills++;
            lost += Lost(path, acknowledged, run == runs);
            if (run % 20 == 0)
                log.WriteLine(FormattableString.Invariant($"{run} runs, {kills} killed, {acknowledged.Count} entries acknowledged, {lost} lost"));
        }
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(path);
        Verification check = archive.Verify();
        log.WriteLine(FormattableString.Invariant($"verify: {check.Records} records, {check.Captures} captures, {check.Damages.Count} damages"));
        return new Outcome(kills, acknowledged.Count, lost, check.Damages.Count);
    }

    /// <summary>Starts this program's adder.</summary>
    public static Process StartAdder(string path, int count, int seed)
    {
        var start = new ProcessStartInfo("dotnet") { RedirectStandardOutput = true, RedirectStandardError = true, UseShellExecute = false };
        foreach (string word in (string[])[typeof(KillLoop).Assembly.Location, "add", path, count.ToString(CultureInfo.InvariantCulture), seed.ToString(CultureInfo.InvariantCulture)])
            start.ArgumentList.Add(word);
        return Process.Start(start) ?? throw new InvalidOperationException("dotnet did not start");
    }

    // One run in four is killed from its start on, so that making and opening the archive are hit too.
    private static bool KillOnce(string path, int seed, Random random, ConcurrentDictionary<int, string> acknowledged)
    {
        using Process adder = StartAdder(path, int.MaxValue, seed);
        bool fromStart = random.Next(4) == 0;
        using var first = new ManualResetEventSlim();
        Task reading = Task.Run(() =>
        {
            while (adder.StandardOutput.ReadLine() is { } line)
            {
                string[] parts = line.Split(' ');
                // A line that the kill cut short acknowledges nothing.
                if (parts.Length == 2 && parts[1].Length == 64)
                    acknowledged[int.Parse(parts[0], CultureInfo.InvariantCulture)] = parts[1];
                first.Set();
            }
        });
        if (!fromStart)
            first.Wait(TimeSpan.FromSeconds(60));
        Thread.Sleep(random.Next(fromStart ? 400 : 120));
        bool ran = !adder.HasExited;
        adder.Kill();
        adder.WaitForExit();
        reading.Wait();
        return ran;
    }

    // Every entry at the end, the latest ones in between.
    private static int Lost(string path, ConcurrentDictionary<int, string> acknowledged, bool all)
    {
        if (acknowledged.IsEmpty)
            return 0;
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(path);
        return acknowledged.OrderByDescending(a => a.Key).Take(all ? int.MaxValue : 50).Count(a => !Has(archive, a.Key, a.Value));
    }

    private static bool Has(MeasurementArchive archive, int entry, string sha256)
    {
        try
        {
            return Convert.ToHexStringLower(SHA256.HashData(archive.Extract(entry))) == sha256;
        }
        catch (ArchiveException)
        {
            return false;
        }
    }
}
