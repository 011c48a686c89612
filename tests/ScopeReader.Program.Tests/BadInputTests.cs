namespace ScopeReader.Program.Tests;

/// <summary>What a person sees first when something is wrong with what they gave: one line, the right status, no stack trace.</summary>
public sealed class BadInputTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-tests-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Write(string name, ReadOnlySpan<byte> bytes)
    {
        string path = Path.Combine(_folder, name);
        File.WriteAllBytes(path, bytes);
        return path;
    }

    private static void HasOneLine(string error, string start)
    {
        Assert.StartsWith(start, error, StringComparison.Ordinal);
        Assert.Single(error.TrimEnd('\n').Split('\n'));
        Assert.DoesNotContain("   at ", error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task An_empty_file_cannot_be_read()
    {
        string path = Write("empty.csv", []);
        (int status, string output, string error) = await BuiltProgram.Run("measure", path);

        Assert.Equal(3, status);
        Assert.Equal("", output);
        HasOneLine(error, $"{path}: ");
    }

    [Fact]
    public async Task Prose_cannot_be_read()
    {
        string path = Write("letter.csv", "Dear bench,\nthe board is on its way.\nIt rings a little, as boards do.\n"u8);
        (int status, string output, string error) = await BuiltProgram.Run("measure", path);

        Assert.Equal(3, status);
        Assert.Equal("", output);
        HasOneLine(error, path);
    }

    [Fact]
    public async Task A_binary_file_cannot_be_read()
    {
        byte[] bytes = new byte[4096];
        new Random(7).NextBytes(bytes);
        string path = Write("binary.csv", bytes);
        (int status, string output, string error) = await BuiltProgram.Run("measure", path);

        Assert.Equal(3, status);
        Assert.Equal("", output);
        HasOneLine(error, path);
        Assert.DoesNotContain(error.TrimEnd('\n'), char.IsControl);
    }

    [Fact]
    public async Task A_missing_file_cannot_be_read()
    {
        string path = Path.Combine(_folder, "missing.csv");
        (int status, _, string error) = await BuiltProgram.Run("measure", path);

        Assert.Equal(3, status);
        HasOneLine(error, $"{path}: ");
    }

    [Fact]
    public async Task A_misspelt_quantity_in_a_plan_is_named_with_its_line_and_the_nearest_word()
    {
        string plan = Write("plan.toml", "[[limit]]\nquantity = \"rise-tme\"\nhigh = \"10 ns\"\n"u8);
        (int status, string output, string error) = await BuiltProgram.Run("measure", Path.Combine(_folder, "missing.csv"), "--plan", plan);

        Assert.Equal(64, status);
        Assert.Equal("", output);
        HasOneLine(error, $"{plan}, line 2: ");
        Assert.Contains("rise-time", error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("measure", "--nominal", "455")]
    [InlineData("measure", "--fast")]
    [InlineData("measure")]
    [InlineData("messure", "a.csv")]
    public async Task A_wrong_command_line_is_one_line_and_status_64(params string[] arguments)
    {
        (int status, string output, string error) = await BuiltProgram.Run(arguments);

        Assert.Equal(64, status);
        Assert.Equal("", output);
        Assert.Single(error.TrimEnd('\n').Split('\n'));
    }
}
