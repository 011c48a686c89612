using System.Text;
using CsCheck;
using CsvHelper;
using ScopeReader.Files.Structure;

namespace ScopeReader.Tests.Captures;

/// <summary>The rows of a block are taken apart by a splitter of our own; CsvHelper is its oracle.</summary>
public class RowSplitterTests
{
    private static readonly Gen<char> s_any = Gen.Char["aZ09 .-+eE,;\t|\"µ"];

    // A cell as RFC 4180 has it: bare without quotes and delimiters, or quoted with its quotes doubled.
    private static Gen<string> Cell(char delimiter) => Gen.Select(s_any.Array[0, 12], Gen.Bool, (text, quoted) =>
    {
        string cell = new string(text).Trim();
        return quoted ? $"\"{cell.Replace("\"", "\"\"", StringComparison.Ordinal)}\"" : cell.Replace("\"", "", StringComparison.Ordinal).Replace(delimiter.ToString(), "", StringComparison.Ordinal).Trim();
    });

    [Theory]
    [InlineData(',')]
    [InlineData(';')]
    [InlineData('\t')]
    [InlineData('|')]
    public void A_line_has_the_cells_that_CsvHelper_finds(char delimiter) =>
        Cell(delimiter).Array[1, 8].Sample(cells =>
        {
            byte[] line = Encoding.UTF8.GetBytes(string.Join(delimiter, cells));
            using CsvReader reader = CsvReader.Create(line, new CsvReaderOptions { Separator = delimiter, HasHeader = false, SkipEmptyLines = false, AllowLineBreaksInQuotes = false, DetectSeparatorHint = false });
            var expected = new List<string>();
            while (reader.Read())
                for (int i = 0; i < reader.FieldCount; i++)
                    expected.Add(reader.GetString(i).Trim());
            string[] found = RowSplitter.Cells(line, delimiter);
            return found.Length == 0 ? expected.All(e => e.Length == 0) : found.SequenceEqual(expected);
        }, iter: 2000);

    [Fact]
    public void Numbers_are_the_same_bits_as_CsvHelper_parses() =>
        Gen.Select(Gen.Double[-1, 1], Gen.Int[-30, 30]).Select((fraction, power) => (fraction * Math.Pow(10, power)).ToString("E16", System.Globalization.CultureInfo.InvariantCulture)).Array[3, 200].Sample(texts =>
        {
            byte[] file = Encoding.UTF8.GetBytes("u\n" + string.Concat(texts.Select(t => t + "\n")));
            using CsvReader reader = CsvReader.Create(file, new CsvReaderOptions { HasHeader = true });
            ReadOnlySpan<double> samples = Import.Bytes(file, new() { Interval = 1 }).Waveform().Samples;
            for (int i = 0; reader.Read(); i++)
                if (BitConverter.DoubleToInt64Bits(reader.Parse<double>(0)) != BitConverter.DoubleToInt64Bits(samples[i]))
                    return false;
            return samples.Length == texts.Length;
        }, iter: 40);
}
