namespace ScopeReader.Tests.Commands;

/// <summary>A wrong command line, word for word: one line, status 64, nothing measured.</summary>
public class UsageTests
{
    [Theory]
    [InlineData("scopereader: unknown verb \"mesure\"; the nearest is measure", "mesure", "a.csv")]
    [InlineData("scopereader: unknown verb \"publish\"; scopereader --help lists the verbs", "publish", "a.csv")]
    [InlineData("scopereader: unknown verb \"publish\"; scopereader --help lists the verbs", "publish", "a.csv", "--output", "b")]
    [InlineData("scopereader: unknown verb \"fnd\"; the nearest is find", "archive", "fnd", "--json")]
    [InlineData("scopereader: unknown verb \"burn\"; scopereader archive --help lists the verbs", "archive", "burn")]
    [InlineData("scopereader: archive needs a verb: add, find, show, amend, trend, remeasure, extract, export, import, verify, backup, stats", "archive")]
    [InlineData("scopereader: unknown option \"--jsn\"; the nearest is --json", "measure", "--jsn", "a.csv")]
    [InlineData("scopereader: unknown option \"--keep\"; the nearest is --help", "inspect", "a.csv", "--keep")]
    [InlineData("scopereader: unknown option \"--plam\"; the nearest is --plan", "a.csv", "--plam=b")]
    [InlineData("scopereader: measure needs a file: scopereader measure FILE", "measure")]
    [InlineData("scopereader: inspect needs a file: scopereader inspect FILE", "inspect", "--json")]
    [InlineData("scopereader: --plan needs a value: --plan FILE", "measure", "a.csv", "--plan")]
    [InlineData("scopereader: --plan needs a value: --plan FILE", "measure", "a.csv", "--plan", "--json")]
    [InlineData("scopereader: --plan is given more than once", "measure", "a.csv", "--plan", "a", "--plan", "b")]
    [InlineData("scopereader: --json and --csv are two forms of the output; keep one of them", "measure", "a.csv", "--csv", "--json")]
    [InlineData("scopereader: --explain shows budgets in the table and in --json; --csv has no place for them", "measure", "a.csv", "--csv", "--explain")]
    [InlineData("scopereader: --nominal: expected a unit after the number, such as 455 kHz, found \"455\"", "measure", "a.csv", "--nominal", "455")]
    [InlineData("scopereader: --nominal: expected more than zero, found \"-1 Hz\"", "measure", "a.csv", "--nominal", "-1 Hz")]
    [InlineData("scopereader: --interval: expected a value in s, such as 1.2 us, found \"2 V\"", "measure", "a.csv", "--interval", "2 V")]
    [InlineData("scopereader: --interval and --rate say the same thing; keep one of them", "measure", "a.csv", "--interval", "1us", "--rate", "1MHz")]
    [InlineData("scopereader: --jobs: expected a whole number from 1 to 256, found \"0\"", "measure", "a.csv", "--jobs", "0")]
    [InlineData("scopereader: a file's name is empty", "measure", "")]
    [InlineData("scopereader: unexpected \"b\" after explain", "explain", "rms", "b")]
    [InlineData("scopereader: unknown quantity \"rise-tme\"; the nearest is rise-time", "explain", "rise-tme")]
    [InlineData("gone.toml: there is no such plan", "measure", "a.csv", "--plan", "gone.toml")]
    [InlineData("gone.toml: there is no such plan", "--plan", "gone.toml")]
    public async Task A_wrong_command_line_is_one_line_and_64(string line, params string[] arguments)
    {
        (int status, string output, string error) = await Run.Program(arguments);
        Assert.Equal((64, "", line + "\n"), (status, output, error));
    }

    [Fact]
    public async Task A_control_character_in_an_argument_does_not_reach_the_terminal()
    {
        (_, _, string error) = await Run.Program("measure", "--\u001b[31mred", "a.csv");
        Assert.Equal("scopereader: unknown option \"--\uFFFD[31mred\"; the nearest is --rate\n", error);
    }

    [Theory]
    [InlineData("--help")]
    [InlineData("measure", "--help")]
    [InlineData("measure", "-h", "--nonsense")]
    [InlineData("inspect", "--help")]
    [InlineData("explain", "--help")]
    public async Task Help_is_no_error_and_fits_the_width_but_for_commands_to_copy(params string[] arguments)
    {
        (int status, string output, string error) = await Run.Program(arguments);
        Assert.Equal((0, ""), (status, error));
        Assert.Contains("Examples\n  scopereader ", output, StringComparison.Ordinal);
        Assert.All(output.Split('\n').Where(l => !l.StartsWith("  scopereader ", StringComparison.Ordinal)), l => Assert.InRange(l.Length, 0, 80));
    }

    [Fact]
    public void Every_file_that_the_help_names_is_there() =>
        Assert.All(ScopeReader.Commands.HelpByExample.Examples.Values.SelectMany(e => e).SelectMany(e => e.Split(' ')).Where(w => w.StartsWith("captures-demo/", StringComparison.Ordinal) && !w.Contains('*')),
            path => Assert.True(File.Exists(Path.Combine(Run.Root, path)), path));

    [Fact]
    public async Task The_version_is_one_line() => Assert.Equal((0, "scopereader 0.1.0\n", ""), await Run.Program("--version"));

    [Fact]
    public async Task Without_a_verb_the_bench_opens_with_the_files_and_the_plan()
    {
        IReadOnlyList<string>? opened = null;
        (int status, _, string error) = await Run.At(80, [Run.Demo("if-source-7.csv"), "--plan", Run.Demo("if-source.toml"), "--nominal", "456kHz", "--no-colour"], (files, plan, path, noColour) =>
        {
            opened = files;
            Assert.Equal((456e3, 3, Run.Demo("if-source.toml"), true), (plan.Nominal, plan.Limits.Count, path, noColour));
            return 0;
        });
        Assert.Equal((0, ""), (status, error));
        Assert.Equal([Run.Demo("if-source-7.csv")], opened);
    }
}
