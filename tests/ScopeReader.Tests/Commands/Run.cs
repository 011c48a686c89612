using ScopeReader.Commands;

namespace ScopeReader.Tests.Commands;

/// <summary>Runs the command line in this process.</summary>
internal static class Run
{
    /// <summary>The folder that holds README.md.</summary>
    public static string Root { get; } = FindRoot();

    /// <summary>A path in captures-demo.</summary>
    public static string Demo(string name) => Path.Combine(Root, "captures-demo", name);

    public static Task<(int Status, string Output, string Error)> Program(params string[] arguments) => At(80, arguments);

    public static async Task<(int Status, string Output, string Error)> At(int width, string[] arguments, OpenBench? bench = null, CancellationToken cancellation = default)
    {
        StringWriter output = new() { NewLine = "\n" }, error = new() { NewLine = "\n" };
        var surroundings = new Surroundings(output, error, () => width, Colour: false, new DateOnly(2026, 6, 1));
        int status = await CommandLine.Run(arguments, surroundings, bench ?? ((_, _, _, _) => throw new InvalidOperationException("the bench was opened")), cancellation);
        return (status, output.ToString(), error.ToString());
    }

    private static string FindRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "ScopeReader.sln")))
            folder = folder.Parent;
        return folder?.FullName ?? throw new InvalidOperationException("the tests run inside the project's folder");
    }
}
