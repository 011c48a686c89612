using System.Security.Cryptography;
using System.Text;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

public class CaptureReaderTests
{
    private static readonly double[] s_samples = [0.5, -0.25, 1, 0.125];

    [Theory]
    [InlineData("Time (s),In 1 (V)\n0,0.5\n1e-6,-0.25\n2e-6,1\n3e-6,0.125\n", "comma", ".")]
    [InlineData("Zeit [µs];Eingang 1 [mV]\r\n0,0;500,0\r\n1,0;-250,0\r\n2,0;1000,0\r\n3,0;125,0\r\n", "semicolon", ",")]
    [InlineData("t\tu\n0\t0.5\n1e-006\t-0.25\n2e-006\t1\n3e-006\t0.125\n", "tab", ".")]
    [InlineData("0      0.5\n1E-06 -0.25\n2E-06  1\n3E-06  0.125", "spaces", ".")]
    [InlineData("t,u\r0,0.5\r1e-6,-0.25\r2e-6,1\r3e-6,0.125\r", "comma", ".")]
    public void Tables_with_a_time_column_are_read_whatever_stands_between_the_columns(string text, string delimiter, string mark)
    {
        CaptureFile file = Import.Text(text);

        Assert.Equal(s_samples, file.Waveform().Samples.ToArray());
        Assert.Equal(1e-6, file.Waveform().Interval, 1e-21); // a few roundings of a double
        Assert.Equal((delimiter, mark), (file.Report.Delimiter, file.Report.DecimalMark));
        Assert.Equal(AxisSource.Column, file.Waveform().Axis.Source);
    }

    [Fact]
    public void Names_and_prefixed_units_come_from_the_header()
    {
        CaptureFile file = Import.Text("Time (us),Gate (mV),Drain current (mA)\n-1.000000,500,2\n0.000000,250,4\n1.000000,125,8\n");

        Assert.Equal(["Gate", "Drain current"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal(["V", "A"], file.Capture.Channels.Select(c => c.Unit));
        Assert.Equal([0.002, 0.004, 0.008], file.Waveform(1).Samples.ToArray());
        Assert.Equal((-1e-6, 1e-6), (file.Waveform().Axis.Start, file.Waveform().Interval));
        Assert.Empty(file.Capture.Doubts);
    }

    [Fact]
    public void Stated_interval_times_a_file_of_samples_alone()
    {
        CaptureFile file = Import.Text("Output (V)\n0.5\n-0.25\n1\n0.125\n", new ImportSettings { Interval = 2e-9 });

        Assert.Equal(s_samples, file.Waveform().Samples.ToArray());
        Assert.Equal((2e-9, AxisSource.Option), (file.Waveform().Interval, file.Waveform().Axis.Source));
    }

    [Fact]
    public void Without_an_interval_readings_are_per_sample_and_a_doubt_says_so()
    {
        CaptureFile file = Import.Text("0.5\n-0.25\n1\n0.125\n");

        Assert.False(file.Waveform().Axis.IsTimed);
        Assert.Contains("per sample until --interval or --rate is given", Assert.Single(file.Capture.Doubts), StringComparison.Ordinal);
    }

    [Fact]
    public void Column_that_counts_the_rows_is_no_time()
    {
        CaptureFile file = Import.Text("0,0.5\n1,-0.25\n2,1\n3,0.125\n");

        Assert.False(file.Waveform().Axis.IsTimed);
        Assert.Equal(s_samples, file.Waveform().Samples.ToArray());
    }

    [Fact]
    public void Spectrum_trace_keeps_its_frequencies_and_decibels()
    {
        CaptureFile file = Import.Text("Frequency (kHz),Trace 1 (dBm)\n450,-81.5\n455,-10.25\n460,-80\n");

        Assert.Equal([450e3, 455e3, 460e3], file.Trace().Frequencies.ToArray());
        Assert.Equal([-81.5, -10.25, -80], file.Trace().Levels.ToArray());
        Assert.Equal("dBm", file.Trace().Unit);
    }

    [Fact]
    public void Hash_is_that_of_the_files_bytes()
    {
        byte[] bytes = Encoding.UTF8.GetBytes("t,u\n0,1\n1e-3,2\n2e-3,3\n");

        // The oracle is the runtime's own SHA-256 of the same bytes.
        Assert.Equal(Convert.ToHexStringLower(SHA256.HashData(bytes)), Import.Bytes(bytes).Capture.Sha256);
    }

    [Fact]
    public void Chain_scale_multiplies_the_samples()
    {
        CaptureFile file = CaptureReader.Read(new MemoryStream("t,u\n0,1\n1e-3,2\n2e-3,3\n"u8.ToArray()), "made.csv", ImportSettings.Automatic, scale: 10);

        Assert.Equal([10, 20, 30], file.Waveform().Samples.ToArray());
    }
}
