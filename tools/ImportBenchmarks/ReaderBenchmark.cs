using System.Buffers.Text;
using System.Globalization;
using BenchmarkDotNet.Attributes;
using CsvHelper;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.ImportSpeed;

namespace ScopeReader.ImportBenchmarks;

/// <summary>Ways from the bytes of a plain export to its numbers; the first finds its structure, hashes it and fits its axis too.</summary>
public class ReaderBenchmark
{
    private const int Rows = 200_000;

    private readonly double[] _times = new double[Rows], _values = new double[Rows];
    private byte[] _file = [];

    [GlobalSetup]
    public void Setup() => _file = Made.Bytes("plain", Rows);

    [Benchmark(Baseline = true)]
    public int CaptureReaderRead() => CaptureReader.Read(new MemoryStream(_file), "made.csv", ImportSettings.Automatic).Capture.Channels.Count;

    [Benchmark]
    public double CsvHelperParse()
    {
        using CsvReader reader = CsvReader.Create(_file, new CsvReaderOptions { HasHeader = false });
        for (int i = 0; reader.Read(); i++)
            (_times[i], _values[i]) = (reader.Parse<double>(0), reader.Parse<double>(1));
        return _values[^1];
    }

    [Benchmark]
    public double Utf8ParserLoop() => Loop((ReadOnlySpan<byte> cell, out double value) => Utf8Parser.TryParse(cell, out value, out int used) && used == cell.Length);

    [Benchmark]
    public double DoubleParseLoop() => Loop((ReadOnlySpan<byte> cell, out double value) => double.TryParse(cell, NumberStyles.Float, CultureInfo.InvariantCulture, out value));

    private delegate bool Parser(ReadOnlySpan<byte> cell, out double value);

    private double Loop(Parser parse)
    {
        ReadOnlySpan<byte> rest = _file;
        for (int i = 0; !rest.IsEmpty; i++)
        {
            int comma = rest.IndexOf((byte)','), end = rest.IndexOf((byte)'\n');
            if (!parse(rest[..comma], out _times[i]) || !parse(rest[(comma + 1)..end], out _values[i]))
                throw new InvalidDataException($"row {i}");
            rest = rest[(end + 1)..];
        }
        return _values[^1];
    }
}
