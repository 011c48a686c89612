using System.Text.Json;

namespace ScopeReader.Tests.Commands;

/// <summary>What the person says about a file: on the command line, in the plan, or remembered in its folder.</summary>
public sealed class ImportOptionTests : IDisposable
{
    // Two readings are plausible: two columns of whole numbers, or one column of numbers with decimal commas.
    private const string Unclear = "12,5\n17,25\n14,75\n9,5\n";

    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-tests-").FullName;

    private string Memory => Path.Combine(_folder, ".scopereader.toml");

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Write(string name, string text)
    {
        string path = Path.Combine(_folder, name);
        File.WriteAllText(path, text);
        return path;
    }

    private static async Task<JsonElement> Inspect(params string[] arguments)
    {
        (int status, string output, string error) = await Run.Program(["inspect", "--json", .. arguments]);
        Assert.Equal((0, ""), (status, error));
        return JsonDocument.Parse(output).RootElement.GetProperty("captures")[0];
    }

    private static double Largest(JsonElement capture) => capture.GetProperty("channels")[0].GetProperty("maximum").GetDouble();

    [Fact]
    public async Task What_is_not_clear_is_refused_with_the_options_that_settle_it()
    {
        string file = Write("a.csv", Unclear);

        Assert.EndsWith("found \"12,5\": two whole numbers, or one number with a decimal comma. Give --delimiter comma or --decimal comma.\n", (await Run.Program("measure", file)).Error, StringComparison.Ordinal);
        Assert.Equal(17.25, Largest(await Inspect(file, "--decimal", "comma")));
        Assert.Equal(2, (await Inspect(file, "--delimiter", ",")).GetProperty("channels").GetArrayLength());
    }

    [Fact]
    public async Task Each_option_says_how_the_file_is_read()
    {
        // Hand-made: the numbers of row three are what each option makes of 2;40;1.
        string file = Write("b.csv", "9;9;9\n0;20;1\n1;30;1\n2;40;1\n");
        JsonElement capture = await Inspect(file, "--delimiter", "semicolon", "--decimal", "point", "--first-line", "2", "--columns", "time,gate,skip", "--units", "us,mV", "--factor", "-10", "--encoding", "latin-1");
        JsonElement channel = capture.GetProperty("channels")[0], axis = capture.GetProperty("axis");

        Assert.Equal(("Latin-1", "semicolon", "."), (capture.GetProperty("encoding").GetString(), capture.GetProperty("delimiter").GetString(), capture.GetProperty("decimalMark").GetString()));
        Assert.Equal(1, capture.GetProperty("channels").GetArrayLength());
        Assert.Equal(("gate", "V", 3), (channel.GetProperty("name").GetString(), channel.GetProperty("unit").GetString(), channel.GetProperty("samples").GetInt32()));
        Assert.Equal((-0.4, -0.2), (channel.GetProperty("minimum").GetDouble(), channel.GetProperty("maximum").GetDouble()));
        Assert.Equal(("column", 1e-6), (axis.GetProperty("source").GetString(), axis.GetProperty("interval").GetDouble()));
    }

    [Fact]
    public async Task Units_make_an_axis_of_frequencies()
    {
        JsonElement capture = await Inspect(Write("c.csv", "10;-80\n20;-20\n30;-81\n40;-82\n"), "--units", "kHz,dBm");
        Assert.Equal(("spectrum", 1e4), (capture.GetProperty("channels")[0].GetProperty("kind").GetString(), capture.GetProperty("axis").GetProperty("interval").GetDouble()));
    }

    [Fact]
    public async Task A_segment_is_chosen()
    {
        string file = Write("d.csv", string.Concat(Enumerable.Range(1, 3).Select(e => $"Event\n4\nt\tv\n0.0\t{e}\n0.5\t{e}.5\n1.0\t{e}\n1.5\t{e}\n")));

        Assert.Equal(3, (await Inspect(file)).GetProperty("channels").GetArrayLength());
        Assert.Equal((1, 2.5), ((await Inspect(file, "--segment", "2")).GetProperty("channels").GetArrayLength(), Largest(await Inspect(file, "--segment", "2"))));
        Assert.EndsWith("expected a segment 9, found none of that number. Run inspect to see the segments.\n", (await Run.Program("measure", file, "--segment", "9")).Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--delimiter: expected comma, semicolon, tab, space, bar or the character itself, found \"coma\"; the nearest is comma", "--delimiter", "coma")]
    [InlineData("--decimal: expected point or comma, found \"dot\"; the nearest is point", "--decimal", "dot")]
    [InlineData("--first-line: expected a whole number from 1 to 2147483647, found 0", "--first-line", "0")]
    [InlineData("--units: unknown unit \"parsec\"; the nearest is ps", "--units", "s,parsec")]
    [InlineData("--factor: expected a number that is not zero, found \"0\"", "--factor", "0")]
    [InlineData("--encoding: expected utf-8, utf-16, utf-16be, latin-1, found \"latin\"; the nearest is latin-1", "--encoding", "latin")]
    [InlineData("--segment: expected a whole number from 1 to 2147483647, found \"one\"", "--decimal", ",", "--segment", "one")]
    public async Task A_value_that_is_none_is_a_wrong_command_line(string line, params string[] options)
    {
        (int status, string output, string error) = await Run.Program(["inspect", "a.csv", .. options]);
        Assert.Equal((64, "", $"scopereader: {line}\n"), (status, output, error));
    }

    [Fact]
    public async Task The_command_line_comes_before_the_plan_and_the_plan_before_the_folder()
    {
        string file = Write("e.csv", "1\n2\n3\n2\n"), plan = Write("plan.toml", "[import]\nfactor = 10\n");
        Write(".scopereader.toml", "[import]\nfactor = 100\ninterval = \"1 us\"\n");

        JsonElement remembered = await Inspect(file), planned = await Inspect(file, "--plan", plan), told = await Inspect(file, "--plan", plan, "--factor", "1", "--interval", "2us");

        Assert.Equal((300, 30, 3), (Largest(remembered), Largest(planned), Largest(told)));
        Assert.Equal(["factor 100", "interval 1 us"], remembered.GetProperty("remembered").EnumerateArray().Select(e => e.GetString()!));
        // What is said louder is not shown as remembered; the interval, on which the plan is silent, still is.
        Assert.Equal(["interval 1 us"], planned.GetProperty("remembered").EnumerateArray().Select(e => e.GetString()!));
        Assert.Empty(told.GetProperty("remembered").EnumerateArray());
    }

    [Fact]
    public async Task A_correction_is_remembered_for_the_folder_and_shown_whenever_it_applies()
    {
        string file = Write("f.csv", Unclear), other = Write("g.csv", Unclear);

        (int status, _, string error) = await Run.Program("inspect", file, "--decimal", ",", "--interval", "2us", "--remember");
        Assert.Equal((0, $"{Memory} now remembers: interval 2us; decimal ,\n"), (status, error));

        (status, string output, error) = await Run.Program("measure", other);
        Assert.Equal((0, ""), (status, error));
        Assert.Contains("4 samples, 2 µs apart", output, StringComparison.Ordinal);
        Assert.Contains("-  read as .scopereader.toml in its folder says: interval 2us; decimal ,\n", output, StringComparison.Ordinal);
        Assert.Contains("folder   .scopereader.toml says: interval 2us; decimal ,\n", (await Run.Program("inspect", other)).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task What_did_not_read_the_file_is_not_remembered()
    {
        (int status, _, _) = await Run.Program("inspect", Write("h.csv", Unclear), "--columns", "time", "--remember");
        Assert.Equal((3, false), (status, File.Exists(Memory)));
    }

    [Fact]
    public async Task A_kept_capture_is_measured_again_as_it_was_read()
    {
        string file = Write("i.csv", Unclear), archive = Path.Combine(_folder, "a.db");
        Write(".scopereader.toml", "[import]\ndecimal = \"comma\"\n");
        Assert.Equal(0, (await Run.Program("measure", file, "--keep", "--archive", archive, "--factor", "2", "--rate", "1 MHz")).Status);

        (int status, string output, string error) = await Run.Program("archive", "remeasure", "1", "--archive", archive);
        Assert.Equal((0, "entry 1, i.csv: nothing changed, unjudged\n", ""), (status, output, error));
    }

    [Theory]
    [InlineData("--remember keeps what the command line says about the files, such as --decimal comma, and it says nothing", "a.csv")]
    [InlineData("--remember keeps it in the file's folder, and standard input has none", "-", "--decimal", "comma")]
    public async Task There_must_be_something_to_remember_and_a_folder_for_it(string line, params string[] arguments)
    {
        (int status, _, string error) = await Run.Program(["inspect", "--remember", .. arguments]);
        Assert.Equal((64, $"scopereader: {line}\n"), (status, error));
    }

    [Fact]
    public async Task Standard_input_is_read_once() =>
        Assert.Equal((64, "", "scopereader: standard input (-) can be read once\n"), await Run.Program("measure", "-", "-"));
}
