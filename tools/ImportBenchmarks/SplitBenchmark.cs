using BenchmarkDotNet.Attributes;
using CsvHelper;
using ScopeReader.Files.Structure;
using ScopeReader.ImportSpeed;

namespace ScopeReader.ImportBenchmarks;

/// <summary>Ways to take rows apart that the quick way leaves: they come one at a time, between rows that it reads.</summary>
public class SplitBenchmark
{
    private const int Rows = 10_000;
    private static readonly CsvReaderOptions s_options = new() { HasHeader = false, SkipEmptyLines = false, AllowLineBreaksInQuotes = false, DetectSeparatorHint = false };

    private byte[] _file = [];

    [GlobalSetup]
    public void Setup() => _file = Made.Bytes("quoted", Rows);

    [Benchmark(Baseline = true)]
    public int OwnSplitter()
    {
        int cells = 0;
        ReadOnlySpan<byte> rest = _file;
        while (rest.IndexOf((byte)'\n') is >= 0 and int end)
        {
            int position = 0;
            while (RowSplitter.Next(rest[..end], ',', ref position, out _))
                cells++;
            rest = rest[(end + 1)..];
        }
        return cells;
    }

    [Benchmark]
    public int CsvHelperOnAllLines()
    {
        int cells = 0;
        using CsvReader reader = CsvReader.Create(_file, s_options);
        while (reader.Read())
            cells += reader.FieldCount;
        return cells;
    }

    [Benchmark]
    public int CsvHelperLineByLine()
    {
        int cells = 0;
        ReadOnlyMemory<byte> rest = _file;
        while (rest.Span.IndexOf((byte)'\n') is >= 0 and int end)
        {
            using CsvReader reader = CsvReader.Create(rest[..(end + 1)], s_options);
            while (reader.Read())
                cells += reader.FieldCount;
            rest = rest[(end + 1)..];
        }
        return cells;
    }
}
