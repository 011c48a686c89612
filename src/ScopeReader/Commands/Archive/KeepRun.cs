using ScopeReader.Archive;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;
using ScopeReader.Files.Output;

namespace ScopeReader.Commands.Archive;

/// <summary><c>measure --keep</c>: measures files, writes them out, and keeps them, in one go.</summary>
internal static class KeepRun
{
    public static Task<int> Measure(MeasureRun run, string[] files, string? planText, string path, IMeasureOutput output, CancellationToken cancellation) =>
        Task.Run(() =>
        {
            // What was kept is told beside the results, which may be for a program.
            using var keeper = new Keeper(path, Describe, run.Surroundings.Error);
            Outcome worst = Outcome.Unjudged;
            bool unusable = false;
            // The results are worth writing although the archive takes no more.
            void Keep(Action work)
            {
                try
                {
                    if (!unusable)
                        work();
                }
                catch (ArchiveException fault)
                {
                    run.Surroundings.Error.WriteLine(SafeText.Of(fault.Message));
                    unusable = true;
                }
            }
            foreach (string file in files)
            {
                MeasuredFile measured;
                try
                {
                    KeptFile kept = KeptFile.Read(file, run.Plan, planText, run.Channel, cancellation);
                    measured = new MeasuredFile(file, kept.Measurement, null);
                    Keep(() => keeper.Keep(kept));
                }
                catch (ImportException fault)
                {
                    run.Surroundings.Error.WriteLine(SafeText.Of(fault.Message));
                    measured = new MeasuredFile(file, null, fault.Message);
                }
                worst = MeasuredFile.Worst(worst, measured.Outcome);
                output.Write(measured);
            }
            output.Finish();
            run.Surroundings.Output.Flush();
            Keep(keeper.Flush);
            return unusable ? ExitStatus.Unreadable : ExitStatus.Of(worst);
        }, cancellation);

    private static NewEntry Describe(KeptFile file) => new()
    {
        File = file.Name,
        Bytes = file.Bytes,
        Measurement = file.Measurement,
        Context = file.Context,
        CapturedAt = file.Date,
        By = Environment.UserName,
        Details = EntryDetails.From(file.Plan),
    };
}
