using System.Globalization;
using CsCheck;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

public class RoundedTimesTests
{
    // The reader widens each half digit by a millionth and each stamp by a few roundings of a double.
    private const double Widened = 1.0001;

    private static Gen<string> OneOf(params string[] formats) => Gen.Int[0, formats.Length - 1].Select(i => formats[i]);

    private static string Rounded(double start, double interval, int count, string format) =>
        "t,u\ns,V\n" + string.Concat(Enumerable.Range(0, count).Select(i => (start + i * interval).ToString(format, CultureInfo.InvariantCulture) + $",{i % 5}\n"));

    [Fact]
    public void The_range_holds_the_true_interval_whatever_the_rounding() =>
        Gen.Select(Gen.Double[1e-9, 1e-3], Gen.Double[-0.5, 0.5], Gen.Int[20, 3000], OneOf("E2", "E3", "E5", "E8")).Sample((interval, offset, count, format) =>
        {
            double start = offset * count * interval;
            TimeAxis axis = Import.Text(Rounded(start, interval, count, format)).Waveform().Axis;
            // Both ends carry a few roundings of a double.
            return axis.IntervalLow <= interval * (1 + 1e-12) && axis.IntervalHigh >= interval * (1 - 1e-12) && axis.IntervalLow <= axis.Interval && axis.Interval <= axis.IntervalHigh;
        }, iter: 80);

    [Fact]
    public void The_range_is_no_wider_than_the_end_points_allow()
    {
        // F03 of the check values, closed form: end points rounded to r bound the step to within r/T; r = 1 ps, 1000 steps of
        // 1.0000003 ns give 1.0 ppm. All stamps together can only do better.
        TimeAxis axis = Import.Text(Rounded(0, 1.0000003e-9, 1001, "0.000000000000")).Waveform().Axis;

        Assert.InRange(axis.RelativeRounding, 1e-9, 1.0e-6 * Widened);
        Assert.InRange(1.0000003e-9, axis.IntervalLow, axis.IntervalHigh);
    }

    [Fact]
    public void The_range_of_a_long_record_is_checked_and_not_kept()
    {
        // Several blocks of text: the farthest stamps of 64 neighbours stand for all of them.
        double interval = 1.00000012e-6;
        TimeAxis axis = Import.Text(Rounded(-0.1, interval, 125_000, "0.0000000")).Waveform().Axis;

        Assert.InRange(interval, axis.IntervalLow, axis.IntervalHigh);
        // Closed form: r/T = 1e-7 s/0.125 s = 8e-7.
        Assert.InRange(axis.RelativeRounding, 0, 8e-7 * Widened);
    }

    [Fact]
    public void Times_that_step_evenly_in_every_digit_give_that_step_and_the_range_that_rounding_leaves()
    {
        TimeAxis axis = Import.Text(Rounded(0, 4e-9, 501, "0.000000000")).Waveform().Axis;

        Assert.Equal(4e-9, axis.Interval);
        // Closed form: end points that each may be half of 1 ns off bound 500 steps of 4 ns to 1 ns/2000 ns either way.
        Assert.Equal(1.0 / 2000, axis.RelativeRounding, 1e-8); // the reader widens each half by a millionth
    }

    [Theory]
    [InlineData("G6", 1e-5)]
    [InlineData("R", 1e-12)]
    public void Trailing_zeros_that_were_left_off_are_no_coarse_rounding(string format, double most)
    {
        // A shortest form prints 0.001 and 0.00101: neither is known to its last digit only. Six digits of 0.01 s leave
        // 1e-8 s/0.01 s = 1 ppm either way; more digits leave less.
        TimeAxis axis = Import.Text(Rounded(0, 1.0 / 98304, 1000, format)).Waveform().Axis;

        Assert.InRange(1.0 / 98304, axis.IntervalLow, axis.IntervalHigh);
        Assert.InRange(axis.RelativeRounding, 0, most);
    }

    [Fact]
    public void A_stated_interval_inside_the_range_is_preferred()
    {
        CaptureFile file = Import.Text("Sample interval,3.3e-8\n" + Rounded(-20e-6, 3.3e-8, 400, "E2"));

        Assert.Equal(3.3e-8, file.Waveform().Interval);
        Assert.True(file.Report.Axis.IntervalHigh > file.Report.Axis.IntervalLow);
        Assert.Contains("33.0000 ns, lies in their range and is used", Assert.Single(file.Capture.Doubts), StringComparison.Ordinal);
    }

    [Fact]
    public void A_stated_interval_outside_the_range_is_a_doubt()
    {
        CaptureFile file = Import.Text("Sample rate,1 MHz\n" + Rounded(0, 2e-6, 100, "0.000000"));

        Assert.Equal(2e-6, file.Waveform().Interval);
        Assert.Contains(file.Capture.Doubts, d => d.StartsWith("the preamble states an interval of 1.00000 µs, the times say 2.00000 µs", StringComparison.Ordinal));
    }

    [Fact]
    public void Times_that_fall_back_or_jump_begin_another_segment()
    {
        string text = "t,u\ns,V\n" + string.Concat(Enumerable.Range(0, 3).Select(s => string.Concat(Enumerable.Range(0, 50).Select(i => $"{(i * 0.5).ToString(CultureInfo.InvariantCulture)},{s}\n"))));
        CaptureFile file = Import.Text(text);

        Assert.Equal([1, 2, 3], file.Capture.Channels.Select(c => c.Segment));
        Assert.All(file.Capture.Channels, c => Assert.Equal(50, c.Count));
        Assert.Contains(file.Capture.Doubts, d => d.EndsWith(": 3 segments", StringComparison.Ordinal));
    }

    [Fact]
    public void A_gap_in_the_times_begins_another_segment()
    {
        string text = "t,u\ns,V\n" + string.Concat(Enumerable.Range(0, 60).Select(i => $"{((i < 40 ? i : i + 25) * 0.5).ToString(CultureInfo.InvariantCulture)},{i}\n"));
        CaptureFile file = Import.Text(text);

        Assert.Equal([40, 20], file.Capture.Channels.Select(c => c.Count));
        Assert.Equal(32.5, file.Waveform(1).Axis.Start);
    }

    [Fact]
    public void A_gap_far_into_a_long_record_is_found()
    {
        const int rows = 120_000, gap = 100_000;
        string text = "t,u\ns,V\n" + string.Concat(Enumerable.Range(0, rows).Select(i => $"{(i < gap ? i : i + 1000).ToString(CultureInfo.InvariantCulture)}e-6,{i % 7}\n"));
        CaptureFile file = Import.Text(text);

        Assert.Equal([gap, rows - gap], file.Capture.Channels.Select(c => c.Count));
        Assert.Equal(1e-6, file.Waveform(1).Interval, 1e-17); // the long record's times are good to a few roundings of a double
    }

    [Fact]
    public void Uneven_times_are_refused() =>
        Assert.Contains("expected evenly spaced times", Import.Refusal("t,u\ns,V\n" + string.Concat(Enumerable.Range(0, 60).Select(i => $"{(i * i * 0.01).ToString(CultureInfo.InvariantCulture)},{i}\n"))).Message, StringComparison.Ordinal);

    [Fact]
    public void Times_kept_in_single_precision_are_even()
    {
        string text = "t,u\ns,V\n" + string.Concat(Enumerable.Range(0, 1000).Select(i => $"{((double)(float)(1e-3 + i * 1e-7)).ToString("E10", CultureInfo.InvariantCulture)},{i % 3}\n"));

        Assert.InRange(1e-7, Import.Text(text).Waveform().Axis.IntervalLow, Import.Text(text).Waveform().Axis.IntervalHigh);
    }
}
