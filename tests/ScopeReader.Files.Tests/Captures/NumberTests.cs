using System.Globalization;
using System.Text;
using CsCheck;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

public class NumberTests
{
    private static Gen<string> OneOf(params string[] formats) => Gen.Int[0, formats.Length - 1].Select(i => formats[i]);

    private static readonly ImportSettings s_timed = new() { Interval = 1 };

    // Doubles of every size, printed in the ways that instruments print them; over-range values are another matter.
    private static readonly Gen<string> s_printed = Gen.Select(Gen.Double[-1, 1], Gen.Int[-300, 30], OneOf("R", "G6", "G15", "G17", "E3", "E9", "E20"),
        (fraction, power, format) => (fraction * Math.Pow(10, power)).ToString(format, CultureInfo.InvariantCulture));

    [Theory]
    [InlineData('.')]
    [InlineData(',')]
    public void Numbers_are_the_same_bits_as_the_runtimes_parser_gives(char mark) =>
        // The oracle is double.Parse, which rounds correctly (IEEE 754) since .NET Core 3.0.
        s_printed.Array[5, 40].Sample(texts =>
        {
            // The quotes round the second number keep these rows off the quick way.
            string file = "a;b\n" + string.Concat(texts.Select(t => $"{t.Replace('.', mark)};{"\"" + t.Replace('.', mark) + "\""}\n"));
            CaptureFile read = Import.Text(file, s_timed with { DecimalMark = mark, Delimiter = ';', Columns = ["a", "b"] });
            double[] expected = [.. texts.Select(t => double.Parse(t, CultureInfo.InvariantCulture))];
            return Same(expected, read.Waveform(0).Samples) && Same(expected, read.Waveform(1).Samples);
        }, iter: 60);

    [Fact]
    public void Numbers_read_the_quick_way_are_the_same_bits_too() =>
        s_printed.Array[5, 400].Sample(texts =>
        {
            CaptureFile read = Import.Text("a,b\n" + string.Concat(texts.Select(t => $"{t},{t}\r\n")), s_timed with { Columns = ["a", "b"] });
            double[] expected = [.. texts.Select(t => double.Parse(t, CultureInfo.InvariantCulture))];
            return Same(expected, read.Waveform(0).Samples) && Same(expected, read.Waveform(1).Samples);
        }, iter: 60);

    [Theory]
    [InlineData("{0},{1}\n", '.')]
    [InlineData("{0},{1},\r\n", '.')]
    [InlineData("{0};{1}\n", ',')]
    [InlineData("{0}\t{1}\n", '.')]
    [InlineData("  {0}   {1}  \n", '.')]
    [InlineData("{0} \t {1}\n", ',')]
    [InlineData("\"{0}\",\"{1}\"\n", '.')]
    [InlineData("{0}V,{1} V\n", '.')]
    [InlineData("{0},V,{1}, V\n", '.')]
    [InlineData("{0};{1};a note;\n", ',')]
    public void Numbers_between_and_behind_anything_are_the_same_bits_too(string row, char mark) =>
        // Stretches of one format each, as instruments print them, so that the layout of one number serves the next.
        Gen.Select(s_printed.Array[1, 30], OneOf("E9", "E3", "G6", "F3", "+0.00E+00;-0.00E+00", "E17", "0"), Gen.Double[-1, 1].Array[40, 400], Gen.Int[-9, 9]).Array[1, 4].Sample(stretches =>
        {
            string[] texts = [.. stretches.SelectMany(s => s.Item1.Concat(s.Item3.Select(v => (v * Math.Pow(10, s.Item4)).ToString(s.Item2, CultureInfo.InvariantCulture))))];
            string file = "a b" + row[(row.IndexOf('}') + 1)..row.IndexOf("{1}", StringComparison.Ordinal)] + "c\n" + string.Concat(texts.Select(t => string.Format(CultureInfo.InvariantCulture, row, t.Replace('.', mark), t.Replace('.', mark))));
            CaptureFile read = Import.Text(file, s_timed with { DecimalMark = mark, FirstLine = 2, Columns = ["a", "b", "c"] });
            double[] expected = [.. texts.Select(t => double.Parse(t, CultureInfo.InvariantCulture))];
            return Same(expected, read.Waveform(0).Samples) && Same(expected, read.Waveform(1).Samples);
        }, iter: 20);

    [Theory]
    [InlineData("1.7976931348623157e308")]
    [InlineData("9007199254740993")]
    [InlineData("123456789012345678901234567890e-40")]
    [InlineData("2.2250738585072011e-308")]
    [InlineData("0.00000000000000000000000000000000000000000000001e47")]
    [InlineData("-0.0")]
    public void Hard_numbers_are_rounded_correctly(string number)
    {
        // Halfway and boundary cases as published with correctly rounding parsers (from memory); the oracle is double.Parse.
        double expected = double.Parse(number, CultureInfo.InvariantCulture);
        if (Math.Abs(expected) > 1e37)
            return;
        Assert.Equal(BitConverter.DoubleToInt64Bits(expected), BitConverter.DoubleToInt64Bits(Import.Text($"u\n1\n{number}\n2\n3\n", s_timed).Waveform().Samples[1]));
    }

    [Fact]
    public void A_large_file_read_in_parts_is_the_same_as_its_rows_one_by_one()
    {
        // Long enough for several blocks over several cores, with rows in between that only the long way reads.
        const int rows = 150_000;
        var text = new StringBuilder("Time (s),U (V)\n");
        for (int i = 0; i < rows; i++)
            text.Append(CultureInfo.InvariantCulture, $"{i}e-6,{(i % 50_021 == 50_020 ? "\"0.5\"" : (i % 977).ToString(CultureInfo.InvariantCulture))}\n");

        CaptureFile read = Import.Text(text.ToString());

        ReadOnlySpan<double> samples = read.Waveform().Samples;
        Assert.Equal(rows, samples.Length);
        for (int i = 0; i < rows; i++)
            Assert.Equal(i % 50_021 == 50_020 ? 0.5 : i % 977, samples[i]);
        Assert.Equal(1e-6, read.Waveform().Interval);
    }

    [Theory]
    [InlineData("9.9E37")]
    [InlineData("-9.9E+37")]
    [InlineData("9.91E37")]
    [InlineData("OL")]
    [InlineData("-inf")]
    [InlineData("NaN")]
    [InlineData("∞")]
    [InlineData("")]
    [InlineData("1e999")]
    public void What_stands_for_no_number_is_counted_located_and_kept_out(string gap)
    {
        CaptureFile read = Import.Text($"t,u\ns,V\n0,1\n1,2\n2,{gap}\n3,4\n4,5\n5,6\n");

        Assert.Equal(1, read.Report.Channels[0].Missing);
        Assert.Equal([4, 5, 6], read.Waveform().Samples.ToArray());
        Assert.Equal(3, read.Waveform().Axis.Start);
        Assert.Contains("u: 1 of 6 samples are missing or over range, the first is sample 3; measured is the longest stretch without them, samples 4 to 6", read.Capture.Doubts);
    }

    [Theory]
    [InlineData("1,234.5", 1234.5)]
    [InlineData("1 234.5", 1234.5)]
    [InlineData("12'345.25", 12345.25)]
    [InlineData("1,234,567", 1234567)]
    public void Thousands_separators_that_cannot_be_a_decimal_mark_are_read(string number, double value) =>
        Assert.Equal(value, Import.Text($"t;u\ns;V\n0;1.5\n1;{number}\n2;3.5\n").Waveform().Samples[1]);

    private static bool Same(double[] expected, ReadOnlySpan<double> found)
    {
        if (found.Length != expected.Length)
            return false;
        for (int i = 0; i < expected.Length; i++)
            if (BitConverter.DoubleToInt64Bits(expected[i]) != BitConverter.DoubleToInt64Bits(found[i]))
                return false;
        return true;
    }
}
