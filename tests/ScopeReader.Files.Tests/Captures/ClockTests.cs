using System.Globalization;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

public class ClockTests
{
    private static string Rows(DateTime first, double step, int count, string format) => string.Concat(Enumerable.Range(0, count)
        .Select(i => first.AddSeconds(i * step).ToString(format, CultureInfo.InvariantCulture) + $",{1.5 + 0.25 * (i % 4)}\n"));

    [Theory]
    [InlineData("HH:mm:ss.fff")]
    [InlineData("yyyy-MM-ddTHH:mm:ss.fff")]
    [InlineData("yyyy-MM-dd HH:mm:ss.fff")]
    [InlineData("dd.MM.yyyy HH:mm:ss.fff")]
    public void A_record_goes_on_past_midnight(string format)
    {
        CaptureFile file = Import.Text(Rows(new DateTime(2031, 5, 6, 23, 59, 58), 0.25, 40, format));

        // By construction: 40 samples, 0.25 s apart, in one record, begun 2 s before midnight.
        Assert.Single(file.Capture.Channels);
        Assert.Equal((40, 0.25), (file.Waveform().Count, Math.Round(file.Waveform().Interval, 12)));
        Assert.Equal(86398, file.Waveform().Axis.Start, 1e-9); // half a nanosecond at a day: a double's last bits
    }

    [Fact]
    public void Several_midnights_pass() =>
        Assert.Equal(3600, Import.Text(Rows(new DateTime(2031, 5, 6, 20, 0, 0), 3600, 60, "HH:mm:ss")).Waveform().Interval, 1e-6); // printed in whole seconds

    [Fact]
    public void A_clock_that_runs_backwards_past_midnight_is_turned_round()
    {
        string[] rows = Rows(new DateTime(2031, 5, 6, 23, 59, 58), 0.25, 40, "HH:mm:ss.fff").Split('\n', StringSplitOptions.RemoveEmptyEntries);
        CaptureFile file = Import.Text(string.Join('\n', rows.Reverse()) + "\n");

        Assert.Equal((40, 1.5), (file.Waveform().Count, file.Waveform().Samples[0]));
    }
}
