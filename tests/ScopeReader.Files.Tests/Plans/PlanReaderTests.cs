using ScopeReader.Captures;
using ScopeReader.Files.Plans;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Plans;

public class PlanReaderTests
{
    private static Plan Read(string text) => PlanReader.Parse(text, "plan.toml");

    private static Plan InChain(string text) => Read("[chain]\n" + text);

    [Fact]
    public void An_empty_plan_says_nothing()
    {
        Plan plan = Read("");
        Assert.Empty(plan.Limits);
        // Lists compare by reference; all the rest compares by value.
        Assert.Equal(Plan.Empty, plan with { Limits = Plan.Empty.Limits });
    }

    [Fact]
    public void The_keys_at_the_top_are_read()
    {
        Plan plan = Read("subject = \"IF source, board 7\"\nserial = \"0042\"\noperator = \"N. N.\"\nnotes = \"warm\"\nnominal = \"455 kHz\"\nchannel = \"CH2\"\n");
        Assert.Equal(("IF source, board 7", "0042", "N. N.", "warm", 455e3, "CH2"), (plan.Subject, plan.Serial, plan.Operator, plan.Notes, plan.Nominal, plan.Channel));
    }

    [Fact]
    public void The_timebase_is_read()
    {
        MeasuringChain chain = InChain("timebase-tolerance = \"25 ppm\"\ntimebase-reads = \"-1.2 ppm\"\ntimebase-uncertainty = \"200 ppb\"\ntimebase-calibrated = 2026-03-31\ntimebase-ageing = \"1 ppm/year\"").Chain;
        Assert.Equal(25, chain.TimebaseTolerancePpm);
        Assert.Equal(-1.2, chain.TimebaseReadsPpm);
        Assert.Equal(0.2, chain.TimebaseUncertaintyPpm);
        Assert.Equal(new DateOnly(2026, 3, 31), chain.TimebaseCalibrated);
        Assert.Equal(1, chain.TimebaseAgeingPpmPerYear);
    }

    [Fact]
    public void The_levels_of_the_chain_are_read()
    {
        MeasuringChain chain = InChain("gain-tolerance = \"2 %\"\noffset-tolerance = \"10 mV\"\nflatness = \"0.5 dB\"\nbits = 8\nscale = -10\ndistortion-floor = \"-60 dBc\"\nimpedance = \"50 ohm\"").Chain;
        Assert.Equal((2d, 0.01, 0.5, 8, -10d, -60d, 50d),
            (chain.GainTolerancePercent, chain.OffsetTolerance, chain.FlatnessDb, chain.Bits, chain.Scale, chain.DistortionFloorDbc, chain.Impedance));
    }

    [Fact]
    public void The_probe_and_the_bandwidths_are_read()
    {
        MeasuringChain chain = InChain("instrument = \"input 2\"\ncalibration-due = \"2027-06-30\"\nprobe-factor = \"10x\"\nprobe-capacitance = \"12 pF\"\nprobe-bandwidth = \"150 MHz\"\n"
            + "ground-lead = \"150 mm\"\ninput-bandwidth = \"100 MHz\"\nbandwidth-basis = \"measured\"\nresponse = \"flat\"").Chain;
        Assert.Equal(("input 2", new DateOnly(2027, 6, 30), 10d), (chain.Instrument, chain.CalibrationDue, chain.ProbeFactor));
        // 12 × 1e-12 and 150 × 1e-3 are off by a rounding at most.
        Assert.Equal(12e-12, chain.ProbeCapacitance!.Value, 1e-26);
        Assert.Equal(0.15, chain.GroundLead!.Value, 1e-15);
        Assert.Equal((150e6, 100e6, BandwidthBasis.Measured, ChainResponse.Flat), (chain.ProbeBandwidth, chain.InputBandwidth, chain.BandwidthBasis, chain.Response));
    }

    [Theory]
    [InlineData("10", 10)]
    [InlineData("\"x10\"", 10)]
    [InlineData("\"10:1\"", 10)]
    [InlineData("\"10 X\"", 10)]
    [InlineData("1.5", 1.5)]
    public void A_probe_factor_is_read_as_people_say_it(string text, double factor) => Assert.Equal(factor, InChain($"probe-factor = {text}").Chain.ProbeFactor);

    [Fact]
    public void The_reference_levels_are_read()
    {
        var levels = Read("[levels]\nreference = [20, \"80 %\"]\nhigh = \"3.3 V\"\nlow = \"-100 mV\"\nestimator = \"shorth\"\nsettling-band = \"5 %\"\novershoot-region = 2.5\nharmonics = 20").Levels;
        Assert.Equal((20d, 80d, 3.3, -0.1, 5d, 2.5, 20),
            (levels.ReferenceLowPercent, levels.ReferenceHighPercent, levels.High, levels.Low, levels.SettlingBandPercent, levels.OvershootRegion, levels.Harmonics));
    }

    [Fact]
    public void The_import_settings_are_read()
    {
        ImportSettings import = Read("[import]\ndelimiter = \"semicolon\"\ndecimal = \"comma\"\nfirst-line = 12\nencoding = \"utf-8\"\ninterval = \"2 us\"\ncolumns = [\"time\", \"CH1\"]\nunits = [\"ms\", \"\"]").Import;
        Assert.Equal((';', ',', 12, "utf-8"), (import.Delimiter, import.DecimalMark, import.FirstLine, import.Encoding));
        Assert.Equal(2e-6, import.Interval!.Value, 1e-21);
        Assert.Equal(["time", "CH1"], import.Columns);
        Assert.Equal(["ms", ""], import.Units);
    }

    [Fact]
    public void A_rate_is_one_over_the_interval() => Assert.Equal(1 / 500e6, Read("[import]\nrate = \"500 MHz\"").Import.Interval);

    [Fact]
    public void Conditions_keep_the_names_and_units_that_the_person_gave()
    {
        var conditions = Read("[conditions]\nsupply = \"5.0 V\"\n\"load capacitance\" = \"470 nF\"\nboard = 7").Conditions;
        Assert.Equal(new Condition(5, "V"), conditions["supply"]);
        Assert.Equal("F", conditions["load capacitance"].Unit);
        Assert.Equal(470e-9, conditions["load capacitance"].Value, 1e-21);
        Assert.Equal(new Condition(7, "1"), conditions["board"]);
    }

    [Fact]
    public void Limits_are_read_in_their_order_and_in_base_units()
    {
        Plan plan = Read("[[limit]]\nquantity = \"frequency-error\"\nlow = \"-50 ppm\"\nhigh = \"0.005 %\"\n[[limit]]\nquantity = \"rise-time\"\nhigh = \"20 ns\"\nrule = \"simple\"\nguard = 0.5\nchannel = \"CH1\"");
        Assert.Equal(2, plan.Limits.Count);
        Limit error = plan.Limits[0], rise = plan.Limits[1];
        Assert.Equal((Quantities.FrequencyError, -50d, 50d, DecisionRule.Guarded, 1d, null), (error.Quantity, error.Low, error.High!.Value, error.Rule, error.Guard, error.Channel));
        Assert.Equal((Quantities.RiseTime, null, DecisionRule.Simple, 0.5, "CH1"), (rise.Quantity, rise.Low, rise.Rule, rise.Guard, rise.Channel));
        Assert.Equal(20e-9, rise.High!.Value, 1e-23); // 20 × 1e-9, one rounding
    }

    [Fact]
    public void A_harmonic_beyond_the_tenth_has_its_limit_where_the_plan_looks_that_far() =>
        Assert.Equal("harmonic-20", Read("[[limit]]\nquantity = \"harmonic-20\"\nhigh = \"-40 dBc\"\n[levels]\nharmonics = 20").Limits.Single().Quantity.Id);

    [Fact]
    public void Tables_written_on_one_line_are_the_same_tables()
    {
        Plan plan = Read("chain.impedance = \"50 ohm\"\nlevels = { harmonics = 5 }\nlimit = [{ quantity = \"thd\", high = \"1 %\" }]");
        Assert.Equal((50d, 5), (plan.Chain.Impedance, plan.Levels.Harmonics));
        Assert.Equal(Quantities.Thd, plan.Limits.Single().Quantity);
    }

    [Fact]
    public void Every_example_in_the_list_of_keys_is_a_value_that_the_reader_takes()
    {
        foreach (PlanKey key in PlanKeyList.All.Where(k => !k.Table.StartsWith("limit", StringComparison.Ordinal)))
        {
            string table = key.Table.Length == 0 ? "" : $"[{key.Table}]\n";
            string beside = key.Name switch
            {
                "timebase-reads" => "timebase-uncertainty = \"0.1 ppm\"\n",
                "timebase-uncertainty" => "timebase-reads = \"0.1 ppm\"\n",
                "timebase-ageing" => "timebase-calibrated = 2026-01-01\n",
                _ => "",
            };
            Assert.NotNull(Read($"{table}{beside}{key.Name} = {key.Example}\n"));
        }
        string limit = string.Join('\n', PlanKeyList.All.Where(k => k.Table == "limit").Select(k => $"{k.Name} = {k.Example}"));
        Assert.Single(Read("[[limit]]\n" + limit).Limits);
        string line = string.Join('\n', PlanKeyList.All.Where(k => k.Table == "limit-line").Select(k => $"{k.Name} = {k.Example}"));
        Assert.Single(Read("[[limit-line]]\n" + line).LimitLines);
    }

    [Fact]
    public void A_byte_order_mark_and_lines_that_end_in_both_characters_do_not_matter() =>
        Assert.Equal("a", Read("\uFEFFsubject = \"a\"\r\n[chain]\r\nbits = 8\r\n").Subject);
}
