using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Captures.Memory;

/// <summary>A folder's memory comes from whoever made the folder.</summary>
public sealed class FolderMemoryTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-tests-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Capture(string memory)
    {
        File.WriteAllText(Path.Combine(_folder, FolderMemory.FileName), memory);
        string capture = Path.Combine(_folder, "made.csv");
        File.WriteAllText(capture, "t,u\ns,V\n0.0,1\n0.1,2\n0.2,3\n");
        return capture;
    }

    [Theory]
    [InlineData("[import]\ndecimal = \"dot\"\n", ", line 2: decimal: expected point or comma, found \"dot\"; the nearest is point")]
    [InlineData("[import]\ncolums = []\n", ", line 2: unknown key \"colums\"; the nearest is columns")]
    [InlineData("[chain]\nscale = 1000\n", ", line 1: expected nothing but [import], found [chain]")]
    [InlineData("nominal = \"1 Hz\"\n[import]\n", ", line 1: expected nothing but [import], found nominal above it")]
    [InlineData("[[import]]\nfactor = 2\n", ", line 1: expected nothing but [import], found [[import]]")]
    [InlineData("[import]\nfactor = nan\n", ", line 2: factor: expected a number with its unit, such as 0.5, found \"NaN\"")]
    [InlineData("[import]\ndecimal = \"\u202Edot\"\n", ", line 2: decimal: expected point or comma, found \"\uFFFDdot\"; the nearest is point")]
    public void A_memory_that_cannot_be_used_is_one_clear_line(string memory, string problem)
    {
        string capture = Capture(memory);
        ImportException refusal = Assert.Throws<ImportException>(() => CaptureReader.Read(capture, ImportSettings.Automatic));
        Assert.Equal($"{capture}: .scopereader.toml in its folder{problem}. Correct or remove that file.", refusal.Message);
    }

    [Fact]
    public void Deep_nesting_and_great_length_are_refused()
    {
        Assert.EndsWith("not readable as TOML: its lists and tables are nested deeper than any plan's. Correct or remove that file.", Refusal("[import]\ncolumns = " + new string('[', 10_000)), StringComparison.Ordinal);
        Assert.EndsWith("expected at most 16 kB, found more. Correct or remove that file.", Refusal(new string('#', 20_000)), StringComparison.Ordinal);
    }

    private string Refusal(string memory)
    {
        string capture = Capture(memory);
        return Assert.Throws<ImportException>(() => CaptureReader.Read(capture, ImportSettings.Automatic)).Message;
    }

    [Fact]
    public void A_link_is_neither_followed_nor_written_through()
    {
        string elsewhere = Path.Combine(_folder, "elsewhere.toml"), capture = Capture("");
        File.WriteAllText(elsewhere, "[import]\nfactor = 2\n");
        File.Delete(FolderMemory.PathFor(capture));
        File.CreateSymbolicLink(FolderMemory.PathFor(capture), elsewhere);

        Assert.EndsWith("expected a file of its own, found a link to another. Correct or remove that file.", Assert.Throws<ImportException>(() => CaptureReader.Read(capture, ImportSettings.Automatic)).Message, StringComparison.Ordinal);
        Assert.Throws<PlanException>(() => FolderMemoryWriter.Remember(capture, Entries("factor = 3")));
        Assert.Equal("[import]\nfactor = 2\n", File.ReadAllText(elsewhere));
    }

    [Theory]
    [InlineData("# mine\n[import] # table\n  decimal = \"point\"   # µ: the old logger\n# end\n", "decimal = \"comma\"", "# mine\n[import] # table\n  decimal = \"comma\"   # µ: the old logger\n# end\n")]
    [InlineData("[import]\nrate = \"1 MHz\" # measured\n", "interval = \"2 us\"", "[import]\ninterval = \"2 us\" # measured\n")]
    [InlineData("[import] # empty\n# more\n", "factor = 2", "[import] # empty\nfactor = 2\n# more\n")]
    [InlineData("[import]\ncolumns = [\"time\", # x\n \"a\"] # y", "factor = 2", "[import]\ncolumns = [\"time\", # x\n \"a\"] # y\nfactor = 2\n")]
    [InlineData("# nothing yet", "factor = 2", "# nothing yet\n[import]\nfactor = 2\n")]
    public void What_is_remembered_goes_into_its_place_and_comments_stay(string before, string entry, string after)
    {
        string capture = Capture(before);
        FolderMemoryWriter.Remember(capture, Entries(entry));
        Assert.Equal(after, File.ReadAllText(FolderMemory.PathFor(capture)));
    }

    [Fact]
    public void What_is_remembered_is_what_is_read()
    {
        string capture = Capture("");
        File.Delete(FolderMemory.PathFor(capture));
        FolderMemoryWriter.Remember(capture, [.. Entries("columns = [\"time\", \"a \\\"b\\\" \\\\ µ\"]\nunits = [\"ms\", \"mV\"]")]);

        Waveform read = CaptureReader.Read(capture, ImportSettings.Automatic).Waveform();
        Assert.Equal(("a \"b\" \\ µ", 0.1e-3), (read.Name, read.Interval));
    }

    [Fact]
    public void A_stream_has_no_folder_and_nothing_is_remembered_for_it() =>
        Assert.Empty(Import.Text("0.1,1\n0.2,2\n0.3,3\n", name: Capture("[import]\nfactor = 2\n")).Report.Remembered);

    private static IReadOnlyList<ImportEntry> Entries(string keys) => ImportTable.Parse("[import]\n" + keys, "made").Entries;
}
