using System.Diagnostics;
using System.Globalization;

namespace ScopeReader.Program.Tests;

/// <summary>Runs the program as it was built, as another process.</summary>
internal static class BuiltProgram
{
    /// <summary>The folder that holds README.md.</summary>
    public static string Root { get; } = FindRoot();

    /// <summary>Starts it in <see cref="Root"/> for lines of so many columns.</summary>
    public static Process Start(int columns, params IEnumerable<string> arguments)
    {
        var start = new ProcessStartInfo("dotnet") { WorkingDirectory = Root, RedirectStandardOutput = true, RedirectStandardError = true, RedirectStandardInput = true };
        // The program's own file lies beside this test's, where the build puts what it references.
        start.ArgumentList.Add(Path.Combine(AppContext.BaseDirectory, "scopereader.dll"));
        foreach (string argument in arguments)
            start.ArgumentList.Add(argument);
        start.Environment["NO_COLOR"] = "1";
        start.Environment["COLUMNS"] = columns.ToString(CultureInfo.InvariantCulture);

        return Process.Start(start)!;
    }

    /// <summary>Runs it in <see cref="Root"/> and waits for its end.</summary>
    public static Task<(int Status, string Output, string Error)> Run(params IEnumerable<string> arguments) => RunAt(80, arguments);

    /// <summary>Runs it for lines of so many columns.</summary>
    public static async Task<(int Status, string Output, string Error)> RunAt(int columns, params IEnumerable<string> arguments)
    {
        using Process process = Start(columns, arguments);
        process.StandardInput.Close();
        using var limit = new CancellationTokenSource(TimeSpan.FromMinutes(1));
        Task<string> output = process.StandardOutput.ReadToEndAsync(limit.Token), error = process.StandardError.ReadToEndAsync(limit.Token);
        await process.WaitForExitAsync(limit.Token);
        return (process.ExitCode, await output, await error);
    }

    private static string FindRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "ScopeReader.sln")))
            folder = folder.Parent;
        return folder?.FullName ?? throw new InvalidOperationException("the tests run inside the project's folder");
    }
}
