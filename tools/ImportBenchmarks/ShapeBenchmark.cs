using BenchmarkDotNet.Attributes;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.ImportSpeed;

namespace ScopeReader.ImportBenchmarks;

/// <summary>The reader on the same samples in other clothes.</summary>
public class ShapeBenchmark
{
    private const int Rows = 200_000;

    private byte[] _file = [];

    /// <summary>What the file looks like.</summary>
    [ParamsSource(nameof(Shapes))]
    public string Shape { get; set; } = "plain";

    /// <summary>The shapes.</summary>
    public static IEnumerable<string> Shapes => Made.Shapes;

    [GlobalSetup]
    public void Setup() => _file = Made.Bytes(Shape, Rows);

    [Benchmark]
    public int Read() => CaptureReader.Read(new MemoryStream(_file), "made.csv", ImportSettings.Automatic).Capture.Channels.Count;
}
