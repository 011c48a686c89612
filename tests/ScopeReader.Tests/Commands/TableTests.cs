using ScopeReader.Captures;
using ScopeReader.Commands.Tables;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Commands;

public class TableTests
{
    private static readonly Waveform Wave = new("CH1", "V", new TimeAxis(0, 1e-8, AxisSource.Column), [0, 1, 0, 1]);

    private static readonly Plan Plan = new() { Subject = "IF source, board 7", Nominal = 455e3, Limits = [new Limit(Quantities.FrequencyError, -50, 50), new Limit(Quantities.RiseTime, null, 80e-9) { Rule = DecisionRule.Simple }] };

    private static Budget Budget(double u, params string[] missing) => new([BudgetTerm.Normal("noise", u), BudgetTerm.Rectangular("timebase", u, ofChain: true)], missing);

    private static Measurement Sample()
    {
        var sheet = new ReadingSheet();
        sheet.Add(new Reading(Quantities.Frequency, 455012.31, "Hz", Budget(6.6), "crossings") { Count = 910, Note = "primary: the edges carry the timing" });
        sheet.Add(new Reading(Quantities.Frequency, 455012.9, "Hz", Budget(7.1), "sine-fit") { IsPrimary = false });
        sheet.Add(new Reading(Quantities.FrequencyError, 27.05, "ppm", Budget(14), "crossings") { Count = 910 });
        sheet.Add(new Reading(Quantities.Amplitude, 3.2993, "V", Budget(0.0002, "gain"), "shorth"));
        for (int k = 2; k <= 6; k++)
            sheet.Add(new Reading(Quantities.Harmonic(k), -10 * k, "dBc", Budget(0.1), "harmonic-fit"));
        sheet.Refuse("between-samples", "the whole edge lies between two samples 10 ns apart; sample faster", Quantities.RiseTime, Quantities.FallTime);
        foreach (int k in (int[])[7, 8, 10])
            sheet.Refuse("too-high", $"{k} times the frequency is above half the sample rate", Quantities.Harmonic(k));
        sheet.Add(new Finding("ringing-kind", "ringing starts at each edge and decays: it is not an oscillation of its own", "edge-excited"));
        ChannelMeasurement channel = new(Wave, sheet.Readings, sheet.NotMeasured, sheet.Findings, Judge.Channel(Plan, Wave, sheet));
        return new Measurement(new Capture("if.csv", new string('a', 64), [Wave], ["the unit is assumed to be V"]), [channel], ["A probe's ground clip is joined to earth."], Outcome.Error);
    }

    private static string At(int width, bool explain = false) => MeasurementTable.Of(Sample(), Plan, explain, width, colour: false);

    // Read by a person before it was approved; the numbers follow from the sample above by hand (U = the 95 % half-width).
    [Theory]
    [InlineData(80)]
    [InlineData(40)]
    public void The_table_reads_as_approved(int width) => Approved.Check($"measure-{width}.txt", At(width, explain: true));

    [Theory]
    [InlineData(40)]
    [InlineData(60)]
    [InlineData(80)]
    [InlineData(120)]
    public void No_line_is_wider_than_the_terminal_and_no_number_is_cut(int width)
    {
        string table = At(width);
        Assert.All(table.Split('\n'), line => Assert.InRange(line.Length, 0, width));
        string flowing = string.Join(' ', table.Split(' ', '\n').Where(w => w.Length > 0));
        foreach (Reading reading in Sample().Channels[0].Readings.Where(r => r.Unit != "dBc"))
            Assert.Contains(Phrases.Of(reading).Replace(Sheet.Joint, ' '), flowing, StringComparison.Ordinal);
    }

    [Fact]
    public void The_answer_comes_before_the_numbers()
    {
        string table = At(80);
        Assert.InRange(table.IndexOf("UNDECIDED", StringComparison.Ordinal), 0, table.IndexOf("Readings", StringComparison.Ordinal));
    }

    [Fact]
    public void Colour_never_says_what_no_word_says()
    {
        string coloured = MeasurementTable.Of(Sample(), Plan, false, 80, colour: true);
        Assert.Contains('\u001b', coloured);
        Assert.Contains("UNDECIDED", coloured, StringComparison.Ordinal);
        Assert.DoesNotContain('\u001b', At(80));
    }

    [Fact]
    public void A_name_from_a_file_neither_drives_the_terminal_nor_is_taken_for_markup()
    {
        var wave = new Waveform("[red]CH\u001b[2J\u202e", "V", TimeAxis.PerSample, [0, 1]);
        var measurement = new Measurement(new Capture("a\u001b]0;x\u0007[/].csv", "", [wave], ["[bold]\u009b1m"]), [new ChannelMeasurement(wave, [], [], [], [])], [], Outcome.Unjudged);
        string table = MeasurementTable.Of(measurement, Plan.Empty, false, 80, colour: false);
        Assert.DoesNotContain(table, c => c != '\n' && (char.IsControl(c) || c == '\u202e'));
        Assert.Contains("[red]CH\uFFFD[2J\uFFFD", table, StringComparison.Ordinal);
        Assert.Contains("[bold]\uFFFD1m", table, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("limit -50 to 50 ppm", -50d, 50d)]
    [InlineData("limit at least -50 ppm", -50d, null)]
    [InlineData("limit at most 12.5 ppm", null, 12.5)]
    public void A_limit_is_said_in_words(string words, double? low, double? high) =>
        Assert.Equal(words, Phrases.Of(new Limit(Quantities.FrequencyError, low, high), "ppm").Replace(Sheet.Joint, ' '));

    [Fact]
    public void Neighbouring_harmonics_are_said_as_a_run() =>
        Assert.Equal("thd, harmonic-2 to harmonic-4, harmonic-6, harmonic-7, rms", Phrases.List([Quantities.Thd, .. Enumerable.Range(2, 3).Select(Quantities.Harmonic), Quantities.Harmonic(6), Quantities.Harmonic(7), Quantities.Rms]));
}
