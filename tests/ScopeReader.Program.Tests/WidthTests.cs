namespace ScopeReader.Program.Tests;

public class WidthTests
{
    [Theory]
    [InlineData(40)]
    [InlineData(60)]
    [InlineData(120)]
    public async Task Lines_are_as_wide_as_COLUMNS_says(int columns)
    {
        (int status, string output, _) = await BuiltProgram.RunAt(columns, "explain", "rise-time");

        int longest = output.Split('\n').Max(line => line.Length);
        Assert.Equal(0, status);
        // Its words have at most 20 letters: a line that could take another one is not full.
        Assert.InRange(longest, columns - 20, columns);
    }
}
