using System.Text;

namespace ScopeReader.Tests.Commands;

/// <summary>The table of export families: a made example of each, and what <c>inspect</c> says of it.</summary>
public class FamilyTableTests
{
    private const int ShownLines = 5, Width = 100;

    private static readonly (string Heading, string[] Files)[] s_families =
    [
        ("A. Settings panel beside the data", ["a-panel-beside-data.csv", "a-panel-comma-decimals.csv", "a-panel-per-channel.csv"]),
        ("B. Names row, unit-word row", ["b-unit-words-rounded-times.csv", "b-two-axes-two-tables.csv"]),
        ("C. Start and increment in the header", ["c-start-and-increment.csv"]),
        ("D. One header row with units", ["d-one-header-row.csv", "d-minimum-and-maximum.csv"]),
        ("E. Names, bracketed scaled units, blank row", ["e-bracketed-scaled-units.csv"]),
        ("F. Keys and values", ["f-keys-and-values.csv", "f-spectrum-start-stop.csv", "f-units-in-cells.csv", "f-infinity-inside.csv"]),
        ("G. Hash comments", ["g-hash-comments.csv"]),
        ("H. Numbers without a header", ["h-no-header.csv", "h-spaces.txt", "h-clock.csv", "h-single-column.txt"]),
        ("I. Logger header with end markers", ["i-logger-end-markers.txt"]),
        ("J. A header block for each event", ["j-block-per-event.txt"]),
        ("K. An axis for each channel", ["k-axis-per-channel.csv"]),
        ("L. Value and unit in separate cells", ["l-unit-cells.csv"]),
        ("M. Tab tables", ["m-tab-table.txt"]),
        ("Also", ["also-time-and-frequency.csv", "also-wide-characters.csv", "also-quoted.csv", "also-clipped.csv"]),
    ];

    private static string Folder { get; } = Path.Combine(Run.Root, "tests", "ScopeReader.Tests", "Commands", "Families");

    [Fact]
    public async Task Inspect_says_of_each_family_what_the_table_has()
    {
        var table = new StringBuilder("# Families of exports\n\nA made example of each, its first lines, and what `scopereader inspect` says of it. Made by the program; a test compares.\n");
        foreach ((string heading, string[] files) in s_families)
        {
            table.Append($"\n## {heading}\n");
            foreach (string file in files)
                table.Append(await Section(file));
        }
        Approved.Check("families.md", table.ToString());
    }

    [Fact]
    public void Every_example_is_in_the_table() =>
        Assert.Equal(s_families.SelectMany(f => f.Files).Order(StringComparer.Ordinal), Directory.GetFiles(Folder).Select(f => Path.GetFileName(f)).Order(StringComparer.Ordinal));

    private static async Task<string> Section(string file)
    {
        string path = Path.Combine(Folder, file);
        (int status, string output, string error) = await Run.At(Width, ["inspect", path]);
        Assert.Equal((0, ""), (status, error));
        return $"\n```\n{FirstLines(path)}\n```\n```\n{output.Replace(path, file, StringComparison.Ordinal).TrimEnd()}\n```\n";
    }

    // As an editor shows them, tabs made visible.
    private static string FirstLines(string path)
    {
        byte[] bytes = File.ReadAllBytes(path);
        Encoding encoding = bytes is [0xFF, 0xFE, ..] ? Encoding.Unicode : bytes.AsSpan().IndexOf((byte)0xFC) >= 0 ? Encoding.Latin1 : Encoding.UTF8;
        string[] lines = encoding.GetString(bytes).TrimStart('\uFEFF').ReplaceLineEndings("\n").Split('\n');
        return string.Join('\n', lines.Take(ShownLines)).Replace("\t", "→", StringComparison.Ordinal) + (lines.Length > ShownLines + 1 ? "\n…" : "");
    }
}
