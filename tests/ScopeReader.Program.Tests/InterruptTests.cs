using System.Diagnostics;
using System.Globalization;
using System.Text;

namespace ScopeReader.Program.Tests;

/// <summary>Ctrl-C while a file is read: the program ends with 130, and soon.</summary>
public sealed class InterruptTests : IDisposable
{
    // Far more than the half second that it takes; less than anybody would wait.
    private static readonly TimeSpan s_soon = TimeSpan.FromSeconds(20);

    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-tests-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public async Task A_pipe_that_nobody_writes_to_any_more()
    {
        if (OperatingSystem.IsWindows())
            return; // Ctrl-C is no signal there.
        using Process program = BuiltProgram.Start(80, "measure", "-");
        await program.StandardInput.WriteAsync("t,u\ns,V\n0.0,1\n0.1,2\n");
        await program.StandardInput.FlushAsync();
        await Running(program);

        Assert.Equal((130, "", ""), await Interrupted(program));
    }

    [Fact]
    public async Task A_pipe_that_goes_on_for_ever()
    {
        if (OperatingSystem.IsWindows())
            return;
        using Process program = BuiltProgram.Start(80, "inspect", "-");
        using var stop = new CancellationTokenSource();
        Task writing = Task.Run(async () =>
        {
            byte[] rows = Encoding.UTF8.GetBytes(string.Concat(Enumerable.Repeat("0.5\n1.5\n2.5\n1.25\n", 4000)));
            while (!stop.IsCancellationRequested)
                await program.StandardInput.BaseStream.WriteAsync(rows, stop.Token);
        });
        await Running(program);

        Assert.Equal((130, "", ""), await Interrupted(program));
        await stop.CancelAsync();
        // Whichever comes first: the end of the pipe or that of the writing.
        await Assert.ThrowsAnyAsync<Exception>(() => writing);
    }

    [Fact]
    public async Task A_large_file()
    {
        if (OperatingSystem.IsWindows())
            return;
        // Times of day keep it on the long way: reading it takes seconds.
        string path = Path.Combine(_folder, "large.csv");
        string block = string.Concat(Enumerable.Range(0, 5000).Select(i => string.Create(CultureInfo.InvariantCulture, $"14:03:{i / 100.0:00.000000},{i % 17}.5\n")));
        using (var file = new StreamWriter(path))
            for (int k = 0; k < 600; k++)
                file.Write(block);
        using Process program = BuiltProgram.Start(80, "inspect", path);
        await Running(program, 0.5);

        Assert.Equal((130, "", ""), await Interrupted(program));
    }

    // Long enough to have begun the work, too short to have done it; there is no sign of that to wait for.
    private static async Task Running(Process program, double seconds = 1.5)
    {
        await Task.Delay(TimeSpan.FromSeconds(seconds));
        Assert.False(program.HasExited);
    }

    private static async Task<(int Status, string Output, string Error)> Interrupted(Process program)
    {
        Task<string> output = program.StandardOutput.ReadToEndAsync(), error = program.StandardError.ReadToEndAsync();
        using (Process kill = Process.Start("kill", ["-INT", program.Id.ToString(CultureInfo.InvariantCulture)]))
            await kill.WaitForExitAsync();
        using var limit = new CancellationTokenSource(s_soon);
        try
        {
            await program.WaitForExitAsync(limit.Token);
        }
        catch (OperationCanceledException)
        {
            program.Kill();
            throw;
        }
        return (program.ExitCode, await output, await error);
    }
}
