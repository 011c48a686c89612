using System.IO.Compression;
using System.Text;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.ImportFuzz;

namespace ScopeReader.Tests.Captures;

public class HardnessTests
{
    [Fact]
    public void Mutated_exports_end_in_a_capture_or_in_one_clear_line()
    {
        // A tenth of the run whose figures DEVELOPERS.md has, with the same seeds.
        for (int i = 0; i < 2000; i++)
        {
            var random = new Random(unchecked(1_000_003 + i));
            Trial trial = Trial.Of(Mutation.Of(Exports.All[random.Next(Exports.All.Count)], random));
            Assert.True(trial.Complaint is null, $"mutation {i} of seed 1 {trial.Complaint}");
        }
    }

    [Fact]
    public void Line_without_an_end_names_the_limit() => Assert.Equal(
        "made.csv, line 1: expected lines of at most 1 MB, found a longer one. Export the capture as CSV with one sample of each channel a line.",
        Refusal(Repeated("1.5 and so on ", 3 << 20)).Message);

    [Fact]
    public void Line_of_a_hundred_megabytes_names_the_limit() => Assert.Equal(
        "made.csv, line 2: expected lines of at most 1 MB, found a longer one. Export the capture as CSV with one sample of each channel a line.",
        Assert.Throws<ImportException>(() => CaptureReader.Read(new LongStream("t,u\n"u8.ToArray(), "1.5,"u8.ToArray(), 100 << 20), "made.csv", ImportSettings.Automatic)).Message);

    [Theory]
    [InlineData(20_000)]
    [InlineData(2_000_000)]
    public void Quotes_in_quotes_in_quotes_name_the_limit_or_the_cell(int count)
    {
        string message = Import.Refusal("t,u\n0.0,1\n0.1,2\n0.2," + new string('"', count) + "\n0.3,4\n0.4,5\n").Message;
        Assert.StartsWith(count > 1 << 20 ? "made.csv, line 4: expected lines of at most 1 MB, found a longer one." : "made.csv, line 4, column 2: expected a number, found \"\"\"\"", message, StringComparison.Ordinal);
        Assert.InRange(message.Length, 1, 300);
    }

    [Fact]
    public void First_column_that_may_be_seconds_or_hertz_is_refused_with_both_readings() => Assert.Equal(
        "made.csv, line 1, column 1: expected an axis in s or Hz, found a first column without a name from 0.5 to 3000.5: times or frequencies. Give --columns time or --columns frequency.",
        Import.Refusal("0.5,1\n1000.5,2\n2000.5,3\n3000.5,2\n").Message);

    [Theory]
    [InlineData("time")]
    [InlineData("frequency")]
    public void What_the_person_says_of_the_first_column_settles_it(string role) =>
        Assert.Equal(role == "time", Import.Text("0.5,1\n1000.5,2\n2000.5,3\n3000.5,2\n", new ImportSettings { Columns = [role] }).Capture.Channels[0] is Waveform);

    [Fact]
    public void Clipped_samples_are_counted_and_located()
    {
        // By construction: a triangle from -1.5 to 1.5 in steps of 0.05, cut off at +1, is held at 1 for 21 samples a period of 120.
        double[] triangle = [.. Enumerable.Range(0, 480).Select(i => Math.Round(Math.Min(1, 1.5 - 0.05 * Math.Abs(60 - i % 120)), 2))];
        int held = triangle.Count(v => v == 1), first = Array.IndexOf(triangle, 1.0) + 1;
        CaptureFile file = Import.Text("U (V)\n" + string.Concat(triangle.Select(v => v.ToString(System.Globalization.CultureInfo.InvariantCulture) + "\n")), new ImportSettings { Interval = 1e-6 });

        Assert.Equal(held, file.Report.Channels[0].Clipped);
        Assert.Contains($"U: {held} of 480 samples are held at -1.5 or 1, the first is sample {first}: clipped, so levels and harmonics read wrong", file.Capture.Doubts);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Lowest_and_highest_of_each_interval_in_rows_of_their_own_are_two_channels(bool breaksOff)
    {
        // By construction: every microsecond once with -k/4 and once with k/8.
        string rows = string.Concat(Enumerable.Range(0, 40).Select(k => FormattableString.Invariant($"{k * 1e-6:0.000000E+00},{-k / 4.0}\n{k * 1e-6:0.000000E+00},{k / 8.0}\n")));
        CaptureFile file = Import.Text("Time (s),U (V)\n" + (breaksOff ? rows[..rows.LastIndexOf("3.9", StringComparison.Ordinal)] : rows));

        Assert.Equal(["U, low", "U, high"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal((breaksOff ? 39 : 40, 1e-6, -0.5, 0.25), (file.Waveform(0).Count, file.Waveform(0).Interval, file.Waveform(0).Samples[2], file.Waveform(1).Samples[2]));
        Assert.Contains("each time stands twice: read as the lowest and the highest sample of every interval, two channels", file.Capture.Doubts);
    }

    [Fact]
    public void A_gap_every_few_rows_costs_no_more_than_its_rows()
    {
        // Rows of another kind every 50: what lies behind each is not read in vain. 200 MB for 4 MB of text would be that.
        string text = "Time (s),U (V)\n" + string.Concat(Enumerable.Range(0, 200_000).Select(i => FormattableString.Invariant($"{i}e-6,{(i % 50 == 49 ? "OL" : "1.25")}\n")));
        CaptureFile file = Import.Text(text);
        Assert.Equal((4000, 49), (file.Report.Channels[0].Missing, file.Waveform().Count));
    }

    [Fact]
    public void Ten_thousand_columns_name_the_limit() => Assert.Equal(
        "made.csv, line 1: expected lines of at most 4096 cells, found a longer one. Export fewer channels at a time.",
        Refusal(Encoding.UTF8.GetBytes(string.Concat(Enumerable.Repeat(string.Concat(Enumerable.Repeat("1,", 10_000)) + "1\n", 3)))).Message);

    [Fact]
    public void Number_of_ten_thousand_digits_names_the_limit() => Assert.Equal(
        "made.csv, line 5, column 2: expected numbers of at most 1024 characters, found a longer one: \"11111111111111111111…\". Export the capture again.",
        Import.Refusal("t,u\n0,1\n1,2\n2,3\n3," + new string('1', 10_000) + "\n4,5\n5,6\n").Message);

    [Fact]
    public void Nul_bytes_are_binary() =>
        Assert.Contains("found binary data", Refusal(Encoding.UTF8.GetBytes("t,u\n0,1\n1,\0\n2,3\n")).Message, StringComparison.Ordinal);

    [Fact]
    public void Quote_that_nobody_closes_does_not_swallow_the_data() =>
        Assert.Equal(3, Import.Text("Note,\"made on\nt,u\n0.0,1\n0.1,2\n0.2,3\n").Waveform().Count);

    [Fact]
    public void Compressed_file_that_unpacks_to_far_more_names_the_limit()
    {
        using var packed = new MemoryStream();
        using (var gzip = new GZipStream(packed, CompressionLevel.Optimal))
            for (int i = 0; i < 64; i++)
                gzip.Write(Repeated("1.5\n", 1 << 20));

        Assert.Equal("made.csv: expected a compressed file to unpack to at most 200 times its size, found more. Unpack it and look at what it holds.", Refusal(packed.ToArray()).Message);
    }

    [Fact]
    public void Compressed_file_that_breaks_off_is_read_as_far_as_it_is_whole_and_said_to_be_cut()
    {
        using var packed = new MemoryStream();
        using (var gzip = new GZipStream(packed, CompressionLevel.Optimal))
            gzip.Write(Repeated("1.5,2.5\n", 1 << 16));

        Assert.Contains("the compressed file breaks off: what could be unpacked of it was read", Import.Bytes(packed.ToArray()[..^20]).Capture.Doubts);
    }

    [Theory]
    [InlineData("t,u\ns,V\n0.0,1.5\n0.1,2.5\n0.2,3.5\n0.3,4", 4)]
    [InlineData("t,u\ns,V\n0.0,1.5\n0.1,2.5\n0.2,3.5\n0.3,", 3)]
    [InlineData("t,u\ns,V\n0.0,1.5\n0.1,2.5\n0.2,3.5\n0.", 3)]
    public void A_file_that_is_still_being_written_is_read_as_far_as_it_is_whole(string text, int whole)
    {
        CaptureFile file = Import.Text(text);

        Assert.Equal(whole, file.Waveform().Count);
        Assert.Equal(whole == 3, file.Capture.Doubts.Contains("the last line breaks off: it was left out"));
    }

    [Fact]
    public void Comma_that_may_be_a_decimal_mark_or_a_thousands_separator_is_refused_with_both_readings() => Assert.Equal(
        "made.csv, line 1, column 1: expected to tell a decimal mark from a thousands separator, found \"1,234\": 1.234 or 1234. Give --decimal comma or --decimal point.",
        Import.Refusal("1,234;5,678\n2,345;6,789\n3,456;7,890\n").Message);

    [Fact]
    public void Comma_that_may_be_a_columns_end_or_a_decimal_mark_is_refused_with_both_readings() => Assert.Equal(
        "made.csv, line 1: expected to tell a column's end from a decimal mark, found \"12,5\": two whole numbers, or one number with a decimal comma. Give --delimiter comma or --decimal comma.",
        Import.Refusal("12,5\n17,25\n14,75\n9,5\n").Message);

    [Fact]
    public void What_the_person_says_settles_it()
    {
        Assert.Equal([12.5, 17.25, 14.75], Import.Text("12,5\n17,25\n14,75\n", new ImportSettings { DecimalMark = ',' }).Waveform().Samples.ToArray());
        Assert.Equal(2, Import.Text("12,5\n17,25\n14,75\n", new ImportSettings { Delimiter = ',' }).Capture.Channels.Count);
    }

    [Fact]
    public void Two_possible_axes_are_refused() => Assert.Equal(
        "made.csv, line 2: expected one axis, found two: time in column 1 and frequency in column 2. Give --columns with time or frequency for the axis and skip for the other.",
        Import.Refusal("time,frequency,level\n0.0,100,1\n0.1,200,2\n0.2,300,3\n0.3,400,4\n").Message);

    [Theory]
    [InlineData("utf-16")]
    [InlineData("utf-16be")]
    public void Wide_text_is_read_with_its_mark_and_without(string name)
    {
        Encoding encoding = name == "utf-16" ? Encoding.Unicode : Encoding.BigEndianUnicode;
        byte[] plain = encoding.GetBytes("Zeit (µs);U (mV)\r\n0,0;1,5\r\n0,1;2,5\r\n0,2;3,5\r\n");
        CaptureFile marked = Import.Bytes([.. encoding.GetPreamble(), .. plain]), bare = Import.Bytes(plain);

        Assert.Equal([0.0015, 0.0025, 0.0035], marked.Waveform().Samples.ToArray());
        Assert.Equal([0.0015, 0.0025, 0.0035], bare.Waveform().Samples.ToArray());
        Assert.StartsWith("UTF-16", bare.Report.Encoding, StringComparison.Ordinal);
    }

    [Fact]
    public void Compressed_text_is_read()
    {
        using var packed = new MemoryStream();
        using (var gzip = new GZipStream(packed, CompressionLevel.Optimal))
            gzip.Write("t,u\ns,V\n0.0,1\n0.1,2\n0.2,3\n"u8);

        Assert.Equal([1, 2, 3], Import.Bytes(packed.ToArray()).Waveform().Samples.ToArray());
    }

    [Theory]
    [InlineData("Abtastrate;2 MHz")]
    [InlineData("Fréquence d'échantillonnage;2 MHz")]
    [InlineData("Frecuencia de muestreo;2 MHz")]
    [InlineData("Frequenza di campionamento;2 MHz")]
    [InlineData("Taxa de amostragem;2 MHz")]
    [InlineData("Częstotliwość próbkowania;2 MHz")]
    [InlineData("采样率;2 MHz")]
    [InlineData("サンプリング周波数;2 MHz")]
    [InlineData("Sample rate;2 MSa/s")]
    [InlineData("Abtastintervall;0,5 µs")]
    [InlineData("Intervalle d'échantillonnage;5.0E-7;s")]
    [InlineData("采样间隔 (us);0.5")]
    public void The_interval_is_found_in_nine_languages(string line) =>
        Assert.Equal(0.5e-6, Import.Text(line + "\nU\n1.5\n2.5\n3.5\n2.5\n").Waveform().Interval, 1e-20); // a last bit

    private static ImportException Refusal(byte[] bytes) => Assert.Throws<ImportException>(() => Import.Bytes(bytes));

    private static byte[] Repeated(string text, int length)
    {
        byte[] once = Encoding.UTF8.GetBytes(text), all = new byte[length / once.Length * once.Length];
        for (int at = 0; at < all.Length; at += once.Length)
            once.CopyTo(all, at);
        return all;
    }
}
