using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Plans;

/// <summary>What is wrong with a plan, word for word: the person reads this at the bench.</summary>
public class PlanErrorTests
{
    private static PlanException Refused(string text) => Assert.Throws<PlanException>(() => PlanReader.Parse(text, "plan.toml"));

    [Theory]
    [InlineData("subjct = \"a\"", "plan.toml, line 1: unknown key \"subjct\"; the nearest is subject")]
    [InlineData("\n[chain]\ntimebase-tolerence = \"25 ppm\"", "plan.toml, line 3: unknown key \"timebase-tolerence\"; the nearest is timebase-tolerance")]
    [InlineData("[chian]\nbits = 8", "plan.toml, line 1: unknown table \"chian\"; the nearest is chain")]
    [InlineData("[[limit]]\nhigh = \"1 us\"\n\n# edges\nquantity = \"rise-tme\"", "plan.toml, line 5: unknown quantity \"rise-tme\"; the nearest is rise-time")]
    [InlineData("[[limit]]\nquantity = \"thd\"\nmax = \"1 %\"", "plan.toml, line 3: unknown key \"max\"; expected one of quantity, low, high, rule, guard, channel")]
    [InlineData("[chain]\ntimebase-tolerance = \"25 pmm\"", "plan.toml, line 2: timebase-tolerance: unknown unit \"pmm\"; the nearest is ppm")]
    [InlineData("[levels]\nlow = \"3 V\"\nhigh = \"1 V\"", "plan.toml, line 2: low: the low state level is not below the high one")]
    [InlineData("nominal = \"455 kHx\"", "plan.toml, line 1: nominal: unknown unit \"kHx\"; the nearest is kHz")]
    [InlineData("[conditions]\nsupply = \"5 Vlt\"", "plan.toml, line 2: supply: unknown unit \"Vlt\"; the nearest is V")]
    [InlineData("[import]\nunits = [\"ms\",\n\"mVV\"]", "plan.toml, line 3: unknown unit \"mVV\"; the nearest is mV")]
    [InlineData("[levels]\nestimator = \"histogram\"", "plan.toml, line 2: estimator: expected shorth, found \"histogram\"; the nearest is shorth")]
    [InlineData("[[limit]]\nquantity = \"thd\"\nhigh = \"1 %\"\nrule = \"gaurded\"", "plan.toml, line 4: rule: expected guarded or simple, found \"gaurded\"; the nearest is guarded")]
    public void An_unknown_word_gets_its_line_and_the_nearest_known_word(string text, string message) => Assert.Equal(message, Refused(text).Message);

    [Theory]
    [InlineData("nominal = 455000", "plan.toml, line 1: nominal: expected text with a number and its unit, such as \"455 kHz\", found 455000")]
    [InlineData("nominal = \"455\"", "plan.toml, line 1: nominal: expected a unit after the number, such as 455 kHz, found \"455\"")]
    [InlineData("nominal = \"-455 kHz\"", "plan.toml, line 1: nominal: expected more than zero, found \"-455 kHz\"")]
    [InlineData("nominal = \"fast\"", "plan.toml, line 1: nominal: expected a number with its unit, such as 455 kHz, found \"fast\"")]
    [InlineData("subject = 7", "plan.toml, line 1: subject: expected text in quotes, found 7")]
    [InlineData("[chain]\ntimebase-tolerance = \"25 kHz\"", "plan.toml, line 2: timebase-tolerance: expected a value in ppm, such as 25 ppm, found \"25 kHz\"")]
    [InlineData("[chain]\ngain-tolerance = \"-2 %\"", "plan.toml, line 2: gain-tolerance: expected zero or more, found \"-2 %\"")]
    [InlineData("[chain]\nbits = 64", "plan.toml, line 2: bits: expected a whole number from 1 to 32, found 64")]
    [InlineData("[chain]\nbits = 8.5", "plan.toml, line 2: bits: expected a whole number from 1 to 32, found 8.5")]
    [InlineData("[chain]\nscale = 0", "plan.toml, line 2: scale: expected a factor that is not zero, found 0")]
    [InlineData("[chain]\nprobe-factor = \"ten\"", "plan.toml, line 2: probe-factor: expected a division, such as \"10x\", found \"ten\"")]
    [InlineData("[chain]\ncalibration-due = \"31.03.2026\"", "plan.toml, line 2: calibration-due: expected a date, such as 2026-03-31, found \"31.03.2026\"")]
    [InlineData("[levels]\nreference = [90, 10]", "plan.toml, line 2: reference: expected two percentages, the lower first, such as [10, 90], found [90, 10]")]
    [InlineData("[levels]\nreference = 10", "plan.toml, line 2: reference: expected a list in [ ], found 10")]
    [InlineData("[levels]\nsettling-band = \"60 %\"", "plan.toml, line 2: settling-band: expected more than 0 % and less than 50 %, found \"60 %\"")]
    [InlineData("[import]\ninterval = \"2 ns\"\nrate = \"500 MHz\"", "plan.toml, line 3: rate: interval and rate say the same thing; keep one of them")]
    [InlineData("[import]\ndelimiter = \"colon\"", "plan.toml, line 2: delimiter: expected comma, semicolon, tab, space, bar or the character itself, found \"colon\"; the nearest is comma")]
    [InlineData("[[limit]]\nquantity = \"rise-time\"\nhigh = \"5 V\"", "plan.toml, line 3: high: expected a value in s, such as 1.2 us, found \"5 V\"")]
    [InlineData("[[limit]]\nquantity = \"amplitude\"\nhigh = \"5 Hz\"", "plan.toml, line 3: high: expected a value in V, such as 3.3 V, found \"5 Hz\"")]
    public void A_value_that_does_not_suit_its_key_is_named_with_what_would(string text, string message) => Assert.Equal(message, Refused(text).Message);

    [Theory]
    [InlineData("[[limit]]\nhigh = \"1 %\"", "plan.toml, line 1: this limit names no quantity; add quantity = \"frequency-error\", or another")]
    [InlineData("[[limit]]\nquantity = \"thd\"", "plan.toml, line 1: this limit on thd has no bound; add low or high")]
    [InlineData("[[limit]]\nquantity = \"thd\"\nlow = \"2 %\"\nhigh = \"1 %\"", "plan.toml, line 3: low: the lower bound, \"2 %\", is above the upper, \"1 %\"")]
    [InlineData("[limit]\nquantity = \"thd\"\nhigh = \"1 %\"", "plan.toml, line 1: expected [[limit]], with two brackets, found [limit]")]
    [InlineData("[[chain]]\nbits = 8", "plan.toml, line 1: expected [chain], found [[chain]]")]
    [InlineData("[[limit]]\nquantity = \"harmonic-12\"\nhigh = \"-40 dBc\"", "plan.toml, line 2: quantity: harmonic-12 is beyond the harmonics that are looked for, 2 to 10; add harmonics = 12 to [levels]")]
    [InlineData("[chain]\nbits = 8\ntimebase-reads = \"1 ppm\"", "plan.toml, line 3: timebase-reads: needs timebase-uncertainty beside it, its standard uncertainty")]
    [InlineData("[chain]\ntimebase-uncertainty = \"1 ppm\"", "plan.toml, line 2: timebase-uncertainty: needs timebase-reads beside it, the error that was found")]
    [InlineData("[chain]\ntimebase-ageing = \"1 ppm/year\"", "plan.toml, line 2: timebase-ageing: needs timebase-calibrated beside it, the day it counts from")]
    public void A_plan_that_is_only_half_said_says_what_is_missing(string text, string message) => Assert.Equal(message, Refused(text).Message);

    [Theory]
    [InlineData("a = \"b\"\nhello world", 2)]
    [InlineData("time,volts\n0,1\n", 1)]
    [InlineData("[chain]\nbits = 8\nbits = 9\n", 3)]
    public void Text_that_is_no_TOML_is_refused_at_its_line(string text, int line)
    {
        PlanException refused = Refused(text);
        Assert.Equal(line, refused.Line);
        Assert.StartsWith($"plan.toml, line {line}: not readable as TOML: ", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_missing_file_a_folder_and_other_bytes_are_told_apart()
    {
        string folder = Directory.CreateTempSubdirectory("plans").FullName, bytes = Path.Combine(folder, "bytes.toml");
        File.WriteAllBytes(bytes, [0x61, 0xFF, 0xFE, 0x62]);
        try
        {
            Assert.Equal("nowhere.toml: there is no such plan", Assert.Throws<PlanException>(() => PlanReader.ReadFile("nowhere.toml")).Message);
            Assert.Equal($"{folder}: expected a plan, found a folder", Assert.Throws<PlanException>(() => PlanReader.ReadFile(folder)).Message);
            Assert.Equal($"{bytes}: expected UTF-8 text, found other bytes; save the plan as UTF-8", Assert.Throws<PlanException>(() => PlanReader.ReadFile(bytes)).Message);
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }
}
