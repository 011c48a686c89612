using System.Diagnostics;
using ScopeReader.Archive;

namespace ScopeReader.ArchiveTrials;

/// <summary>Fills an archive.</summary>
internal static class Maker
{
    private const int Samples = 200;

    public static int Run(string path, int count)
    {
        using MeasurementArchive archive = MeasurementArchive.Open(path);
        var watch = Stopwatch.StartNew();
        for (int seed = 0; seed < count; seed += MeasurementArchive.LargestBatch)
        {
            int size = Math.Min(MeasurementArchive.LargestBatch, count - seed);
            archive.Add([.. Enumerable.Range(seed, size).Select(s => MadeCapture.Entry(s, Samples))]);
        }
        Console.WriteLine(FormattableString.Invariant($"{count} entries of {Samples} samples in {watch.Elapsed.TotalSeconds:F1} s, {archive.Stats().FileBytes / 1e6:F1} MB"));
        return 0;
    }
}
