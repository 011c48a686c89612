using System.Text;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

/// <summary>One made export of each family that is met on the bench, and what is understood of it.</summary>
/// <remarks>The numbers written into each text are the expected values; every text is invented.</remarks>
public class FamilyTests
{
    // Numbers with decimal points, one row a line, from a function of the row.
    private static string Rows(int count, Func<int, string> row) => string.Concat(Enumerable.Range(0, count).Select(i => row(i) + "\n"));

    private static string F(double value, string format = "G9") => value.ToString(format, System.Globalization.CultureInfo.InvariantCulture);

    [Fact]
    public void A_settings_panel_beside_the_data()
    {
        string[] panel = ["Points,40,,", "Step,2.0e-6,,", "Unit,V,,", "Note,made on the bench,,"];
        CaptureFile file = Import.Text(Rows(40, i => (i < panel.Length ? panel[i] : ",,,") + $"{F(-400e-6 + 2e-6 * i, "0.000000")},{F(0.125 * i)},"));

        Assert.Equal((40, 0.25), (file.Waveform().Count, file.Waveform().Samples[2]));
        Assert.Equal((2e-6, -400e-6, "V"), (file.Waveform().Interval, file.Waveform().Axis.Start, file.Waveform().Unit));
        Assert.Equal((0, 0, 1L), (file.Report.PreambleLines, file.Report.HeaderRows, file.Report.FirstLine));
    }

    [Fact]
    public void A_panel_repeated_for_each_channel()
    {
        CaptureFile file = Import.Text(Rows(30, i => (i == 0 ? "Points,30,," : ",,,") + $"{F(1e-6 * i)},{F(i * 0.5)},," + (i == 0 ? "Points,30,," : ",,,") + $"{F(1e-6 * i)},{F(-i)},"));

        Assert.Equal(2, file.Capture.Channels.Count);
        Assert.Equal((0.5, -1), (file.Waveform(0).Samples[1], file.Waveform(1).Samples[1]));
        Assert.Equal((1e-6, 1e-6), (file.Waveform(0).Interval, file.Waveform(1).Interval));
    }

    [Fact]
    public void A_comma_decimals_in_the_data_and_points_in_the_panel()
    {
        CaptureFile file = Import.Text(Rows(30, i => (i == 0 ? "Step;2.0e-6;;" : ";;;") + $"{F(2e-6 * i, "0.000000").Replace('.', ',')};{F(0.25 * i, "0.00").Replace('.', ',')};"));

        Assert.Equal(("semicolon", ",", 2e-6, 0.5), (file.Report.Delimiter, file.Report.DecimalMark, file.Waveform().Interval, file.Waveform().Samples[2]));
    }

    [Fact]
    public void B_numeric_names_over_unit_words_with_times_of_three_digits()
    {
        // Steps of 0.03 µs printed to three digits: neighbours repeat before -10 µs.
        CaptureFile file = Import.Text("t,2,4\nsecond,Volt,Ampere\n" + Rows(400, i => $"{F(-20e-6 + 0.03e-6 * i, "0.00E+00")},{F(i, "+0.00E+00")},-3.1E-03"));

        Assert.Equal(["2", "4"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal(["V", "A"], file.Capture.Channels.Select(c => c.Unit));
        TimeAxis axis = file.Waveform().Axis;
        Assert.InRange(0.03e-6, axis.IntervalLow, axis.IntervalHigh);
        Assert.True(axis.IntervalHigh > axis.IntervalLow);
    }

    [Fact]
    public void B_two_tables_side_by_side_of_different_length()
    {
        CaptureFile file = Import.Text("t,u,t,i\ns,V,s,A\n" + Rows(60, i => $"{F(1e-3 * i)},{i}," + (i < 40 ? $"{F(2e-3 * i)},{F(0.5 * i)}" : ",")));

        Assert.Equal((60, 40), (file.Waveform(0).Count, file.Waveform(1).Count));
        Assert.Equal((1e-3, 2e-3), (file.Waveform(0).Interval, file.Waveform(1).Interval));
    }

    [Fact]
    public void B_a_second_table_below_the_first()
    {
        CaptureFile file = Import.Text("t,u\ns,V\n" + Rows(20, i => $"{F(1e-3 * i)},{i}") + "\nt,a,b\ns,A,A\n" + Rows(20, i => $"{F(5e-3 * i)},{i},{2 * i}"));

        Assert.Equal(["u", "a", "b"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal(5e-3, file.Waveform(2).Interval);
    }

    [Fact]
    public void B_empty_first_values_are_missing_and_said_to_be()
    {
        CaptureFile file = Import.Text("t,u\ns,V\n" + Rows(20, i => $"{F(1e-3 * i)},{(i < 2 ? "" : F(i))}"));

        Assert.Equal((18, 2e-3, 2), (file.Waveform().Count, file.Waveform().Axis.Start, file.Report.Channels[0].Missing));
        Assert.Contains("2 of 20 samples are missing", Assert.Single(file.Capture.Doubts), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("N,A,B,T0,Step,\nCount,Volt,Volt,-2.0e-4,5.0e-7\n")]
    [InlineData("X,A,B,Start,Increment,\nSequence,Volt,Volt,-2.0e-4,5.0e-7\n")]
    public void C_start_and_step_in_spare_columns_of_the_header(string header)
    {
        CaptureFile file = Import.Text(header + Rows(20, i => $"{i},{F(0.12 * i)},3.30,"));

        Assert.Equal(["A", "B"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal((-2e-4, 5e-7, AxisSource.Preamble), (file.Waveform().Axis.Start, file.Waveform().Interval, file.Waveform().Axis.Source));
        Assert.Equal("V", file.Waveform().Unit);
    }

    [Theory]
    [InlineData("in s,A in V", "A")]
    [InlineData("[s],A[V]", "A")]
    [InlineData("Time (s),Voltage 1 (V)", "Voltage 1")]
    [InlineData("t / s,U / V", "U")]
    [InlineData(",Voltage 1 (V)", "Voltage 1")]
    public void D_one_header_row_with_units(string header, string name)
    {
        CaptureFile file = Import.Text(header + "\n" + Rows(12, i => $"{F(1.5e-6 * i)},{F(0.1 * i)}"));

        Assert.Equal((name, "V", 1.5e-6), (file.Waveform().Name, file.Waveform().Unit, file.Waveform().Interval));
        Assert.Equal(1, file.Report.HeaderRows);
    }

    [Fact]
    public void D_minimum_and_maximum_of_each_interval_are_two_channels()
    {
        CaptureFile file = Import.Text("in s,A low in V,A high in V\n" + Rows(12, i => $"{F(1e-6 * i)},{F(-0.1 * i)},{F(0.1 * i)}"));

        Assert.Equal(["A low", "A high"], file.Capture.Channels.Select(c => c.Name));
    }

    [Fact]
    public void E_bracketed_scaled_units_and_a_blank_row_inside_the_header()
    {
        CaptureFile file = Import.Text("Time,Input 1\n(us),(mV)\n\n" + Rows(12, i => $"{F(-0.1 + 0.05 * i, "0.00")},{F(12.5 * i)}"));

        Assert.Equal(("Input 1", "V", 0.0125), (file.Waveform().Name, file.Waveform().Unit, file.Waveform().Samples[1]));
        Assert.Equal((0.05e-6, -0.1e-6), (file.Waveform().Interval, file.Waveform().Axis.Start));
        Assert.Equal((0, 2, 4L), (file.Report.PreambleLines, file.Report.HeaderRows, file.Report.FirstLine));
    }

    [Fact]
    public void F_key_and_value_preamble_with_the_interval()
    {
        CaptureFile file = Import.Text("Made by,the bench,\nStep,4.0e-9,\nSource,Gate drive,\nVertical units,V,\nData begins,\n" + Rows(12, i => $"{F(0.1 * i)},"));

        Assert.Equal(("Gate drive", "V", 4e-9, AxisSource.Preamble), (file.Waveform().Name, file.Waveform().Unit, file.Waveform().Interval, file.Waveform().Axis.Source));
        Assert.Equal(5, file.Report.PreambleLines);
    }

    [Fact]
    public void F_frequency_axis_from_start_and_stop_of_the_preamble()
    {
        CaptureFile file = Import.Text("sep=;\nStart;1000,0;Hz;\nStop;2000,0;Hz;\nRBW;10,0;Hz;\nUnit;dBm;\n" + Rows(11, i => $"{F(-80.5 + i, "0.0").Replace('.', ',')};"));

        Assert.Equal((1000, 2000, 10, "dBm"), (file.Trace().Frequencies[0], file.Trace().Frequencies[^1], file.Trace().ResolutionBandwidth, file.Trace().Unit));
        Assert.Equal(-79.5, file.Trace().Levels[1]);
    }

    [Fact]
    public void F_units_inside_the_cells()
    {
        CaptureFile file = Import.Text("RBW,3kHz\n" + Rows(12, i => $"{i},{F(350 + 50 * i, "0.0")}Hz,{F(-41.2 + i, "0.0")}dBm"));

        Assert.Equal((400, -40.2, "dBm", 3000), (file.Trace().Frequencies[1], file.Trace().Levels[1], file.Trace().Unit, file.Trace().ResolutionBandwidth));
    }

    [Fact]
    public void F_preamble_and_data_repeated_for_each_channel()
    {
        string Block(string name) => $"Source,{name}\nStep,4.0e-9\nPoints,12\n" + Rows(12, i => F(0.5 + i));
        CaptureFile file = Import.Text(Block("Gate") + Block("Drain"));

        Assert.Equal([("Gate", 1), ("Drain", 1)], file.Capture.Channels.Select(c => (c.Name, c.Segment)));
        Assert.Equal((4e-9, 12), (file.Waveform(1).Interval, file.Waveform(1).Count));
    }

    [Fact]
    public void F_a_list_of_segments_before_the_data_is_no_data()
    {
        CaptureFile file = Import.Text("Segments,2\n1,0.0\n2,0.5\nTime (s),U (V)\n" + Rows(40, i => $"{F(1e-3 * i)},{i}"));

        Assert.Equal((40, 5L), (file.Waveform().Count, file.Report.FirstLine));
    }

    [Fact]
    public void F_infinities_in_the_data_are_missing()
    {
        CaptureFile file = Import.Text("Time (s),U (V)\n" + Rows(20, i => $"{F(1e-3 * i)},{(i == 15 ? "inf" : F(i))}"));

        Assert.Equal((15, 1), (file.Waveform().Count, file.Report.Channels[0].Missing));
    }

    [Fact]
    public void G_comments_state_the_rate_and_a_comment_is_the_header()
    {
        CaptureFile file = Import.Text("#Rate: 50000Hz\n#Points: 20\n#Input 1 (V)\n" + Rows(20, i => F(0.25 * i)));

        Assert.Equal(("Input 1", "V", 2e-5, AxisSource.Preamble), (file.Waveform().Name, file.Waveform().Unit, file.Waveform().Interval, file.Waveform().Axis.Source));
    }

    [Fact]
    public void G_comments_a_blank_line_and_a_header()
    {
        CaptureFile file = Import.Text("#Rate: 50000Hz\n#Points: 20\n\nTime (s),Input 1 (V)\n" + Rows(20, i => $"{F(2e-5 * i)},{i}"));

        Assert.Equal((2e-5, AxisSource.Column), (file.Waveform().Interval, file.Waveform().Axis.Source));
        Assert.Empty(file.Capture.Doubts);
    }

    [Theory]
    [InlineData("8.0e-005,1.30\n9.0e-005,1.25\n1.0e-004,1.35\n1.1e-004,1.40\n1.2e-004,1.45\n1.3e-004,1.50\n", 1e-5, 1.25)]
    [InlineData("\n2.5e-005,1.30\n5.0e-005,1.35\n7.5e-005,1.40\n", 2.5e-5, 1.35)]
    [InlineData("-1.2E-06   4.0E-03\n-1.1E-06   5.0E-03\n-1.0E-06   6.0E-03", 1e-7, 5e-3)]
    [InlineData("\uFEFF0.1 1.5\n0.2 1.25\n0.3 1.75\n", 0.1, 1.25)]
    [InlineData("14:03:07.250,1.5\n14:03:07.500,1.25\n14:03:07.750,1.75\n", 0.25, 1.25)]
    [InlineData("2031-05-06T14:03:59.5,1.5\n2031-05-06T14:04:00.0,1.25\n2031-05-06T14:04:00.5,1.75\n", 0.5, 1.25)]
    [InlineData("06.05.2031;14:03:59,5;1,5\n06.05.2031;14:04:00,0;1,25\n06.05.2031;14:04:00,5;1,75\n", 0.5, 1.25)]
    public void H_numbers_without_a_header(string text, double interval, double second)
    {
        CaptureFile file = Import.Text(text);

        Assert.Equal(interval, file.Waveform().Interval, interval * 1e-12); // ten digits beyond what is printed
        Assert.Equal(second, file.Waveform().Samples[1]);
    }

    [Fact]
    public void I_logger_header_with_end_markers_and_more_names_than_columns()
    {
        string text = "Log\t2\nSeparator\tTab\nDecimal sign\t,\nOperator\tJürgen\n---end---\nChannels\t1\nSamples\t20\nY unit\tVolt\n---end---\nX\tIn0\tNote\n"
            + Rows(20, i => $"{F(0.001 * i, "0.000").Replace('.', ',')}\t{F(0.031 * i, "0.000").Replace('.', ',')}");
        CaptureFile file = Import.Bytes(Encoding.Latin1.GetBytes(text));

        Assert.Equal(("Latin-1", "tab", ","), (file.Report.Encoding, file.Report.Delimiter, file.Report.DecimalMark));
        Assert.Equal(("In0", 0.031, 0.001, "V"), (file.Waveform().Name, file.Waveform().Samples[1], file.Waveform().Interval, file.Waveform().Unit));
    }

    [Fact]
    public void J_a_header_block_for_each_event()
    {
        CaptureFile file = Import.Text(string.Concat(Enumerable.Range(1, 3).Select(e => "Event\n15\nt\tv\n" + Rows(15, i => $"{F(0.002 * i, "0.000")}\t{F(e + 0.1 * i)}"))));

        Assert.Equal([1, 2, 3], file.Capture.Channels.Select(c => c.Segment));
        Assert.Equal((15, 3.1, "v", 0.002), (file.Waveform(2).Count, file.Waveform(2).Samples[1], file.Waveform(2).Name, file.Waveform(2).Interval));
        Assert.Single(Import.Text("Event\n4\nt\tv\n0\t1\n.5\t2\n1\t3\n1.5\t4\nEvent\n4\nt\tv\n0\t5\n.5\t6\n1\t7\n1.5\t8\n", new ImportSettings { Segment = 2 }).Capture.Channels);
    }

    [Fact]
    public void K_an_x_column_for_each_channel()
    {
        CaptureFile file = Import.Text("A t,A v,B t,B v\n" + Rows(20, i => $"{F(1e-3 * i)},{i},{F(1e-3 * i + 5e-4)},{F(-i)}"));

        Assert.Equal(["A v", "B v"], file.Capture.Channels.Select(c => c.Name));
        Assert.Equal(5e-4, file.Waveform(1).Axis.Start);
    }

    [Fact]
    public void K_times_that_fall_are_turned_round_and_said_to_be()
    {
        CaptureFile file = Import.Text("t,v\ns,V\n" + Rows(20, i => $"{F(1e-3 * (19 - i))},{i}"));

        Assert.Equal((0, 1e-3, 19), (file.Waveform().Axis.Start, file.Waveform().Interval, file.Waveform().Samples[0]));
        Assert.Contains("backwards", Assert.Single(file.Capture.Doubts), StringComparison.Ordinal);
    }

    [Fact]
    public void K_an_x_that_only_counts_the_points_is_no_time()
    {
        CaptureFile file = Import.Text("A t,A v,B t,B v\n" + Rows(20, i => $"{i},{F(0.5 * i)},{i},{F(-i)}"));

        Assert.Equal(["A v", "B v"], file.Capture.Channels.Select(c => c.Name));
        Assert.All(file.Capture.Channels, c => Assert.False(((Waveform)c).Axis.IsTimed));
    }

    [Fact]
    public void L_value_and_unit_in_separate_cells_and_a_prefix_that_changes()
    {
        CaptureFile file = Import.Text("Trace,\nF,,L,,\n" + Rows(20, i => i < 10 ? $"  {F(990 + i, "0.0")},kHz,{F(-41.5 + i)}, dBm," : $"  {F(0.990 + 0.001 * i, "0.000")},MHz,{F(-41.5 + i)}, dBm,"));

        Assert.Equal((991e3, -40.5, "dBm"), (file.Trace().Frequencies[1], file.Trace().Levels[1], file.Trace().Unit));
        Assert.Equal(1.009e6, file.Trace().Frequencies[^1], 1e-6); // a last bit
    }

    [Fact]
    public void M_tab_table_with_decimal_commas_and_a_return_alone_after_the_header()
    {
        CaptureFile file = Import.Text("f[Hz]\tU\tRemark\r" + Rows(12, i => $"{F(120.5 + i, "0.00").Replace('.', ',')}\t{F(0.031 * (i + 1), "0.000").Replace('.', ',')}"));

        Assert.Equal((120.5, 0.031, "U"), (file.Trace().Frequencies[0], file.Trace().Levels[0], file.Trace().Name));
    }

    [Fact]
    public void Time_and_frequency_tables_in_one_file()
    {
        CaptureFile file = Import.Text("Time (s),U (V)\n" + Rows(20, i => $"{F(1e-6 * i)},{i}") + "\nFrequency (Hz),Level (dBV)\n" + Rows(20, i => $"{F(1e3 * i)},{F(-50 - i)}"));

        Assert.IsType<Waveform>(file.Capture.Channels[0]);
        Assert.IsType<SpectrumTrace>(file.Capture.Channels[1]);
        Assert.Empty(file.Capture.Doubts);
    }
}
