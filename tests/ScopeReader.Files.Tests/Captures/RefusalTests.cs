using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

public class RefusalTests
{
    [Fact]
    public void Empty_file() => Assert.Equal(
        "made.csv: expected a table of numbers, found an empty file. Save the capture again.", Import.Refusal("").Message);

    [Fact]
    public void Prose() => Assert.Equal(
        "made.csv: expected a table of numbers, found only text: \"Dear all, the board came back. It rings more than before. Th…\". Export the capture as CSV.",
        Import.Refusal("Dear all, the board came back. It rings more than before.\nThe captures follow.\n").Message);

    [Fact]
    public void Binary() => Assert.Equal(
        "made.csv: expected a table of numbers as text, found binary data. Export the capture as CSV.",
        Assert.Throws<ImportException>(() => Import.Bytes([0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A, 0, 0, 0, 13, 1, 2, 3, 4, 0, 0, 7, 8])).Message);

    [Fact]
    public void Missing_file() => Assert.Equal(
        "no-such.csv: expected a file, found none of that name. Check the name and the folder.",
        Assert.Throws<ImportException>(() => CaptureReader.Read("no-such.csv", ImportSettings.Automatic)).Message);

    [Fact]
    public void Ragged_row_names_its_line_and_the_columns()
    {
        ImportException refusal = Import.Refusal("time,CH1,CH2\n0,1,2\n1e-6,1,2\n1.2035e-06,0.417\n3e-6,1,2\n");

        Assert.Equal("made.csv, line 4: expected 3 columns (time, CH1, CH2), found 2: \"1.2035e-06,0.417\". Export the capture again with all channels in every line.", refusal.Message);
        Assert.Equal(("made.csv", 4L, null), (refusal.File, refusal.Line, refusal.Column));
    }

    [Fact]
    public void Word_among_the_numbers_names_its_line_and_column()
    {
        ImportException refusal = Import.Refusal("time,CH1\n0,1\n1e-6,1\n2e-6,so\u0007so\n3e-6,1\n");

        Assert.Equal("made.csv, line 4, column 2: expected a number, found \"so\uFFFDso\". Remove the line, or leave the column out: --columns with skip in its place.", refusal.Message);
    }
}
