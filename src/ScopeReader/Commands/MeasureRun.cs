using ScopeReader.Commands.Tables;
using ScopeReader.Files.Output;

namespace ScopeReader.Commands;

/// <summary>One run of <c>measure</c>: the same settings for every file.</summary>
/// <param name="Surroundings">What it writes to.</param>
/// <param name="Plan">The plan, with what the command line says in it.</param>
/// <param name="Channel">Measure only this channel; null for all.</param>
/// <param name="Explain">Whether budgets are shown.</param>
internal sealed record MeasureRun(Surroundings Surroundings, Plan Plan, string? Channel, bool Explain)
{
    /// <summary>Measures the files and writes them out.</summary>
    /// <returns>The exit status: of several files the worst counts.</returns>
    public async Task<int> Measure(string[] files, int jobs, IMeasureOutput output, CancellationToken cancellation)
    {
        Outcome worst = Outcome.Unjudged;
        using ProgressLine progress = Surroundings.Progress(cancellation);
        await foreach (MeasuredFile file in CaptureMeasurer.MeasureAll(files, f => CaptureMeasurer.Measure(f, Plan, Channel, progress, cancellation), jobs, output.InOrder, cancellation))
        {
            worst = MeasuredFile.Worst(worst, file.Outcome);
            progress.Aside(() =>
            {
                if (file.Error is not null)
                    Surroundings.Error.WriteLine(SafeText.Of(file.Error));
                output.Write(file);
            });
        }
        output.Finish();
        Surroundings.Output.Flush();
        return ExitStatus.Of(worst);
    }
}
