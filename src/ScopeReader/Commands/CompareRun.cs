using ScopeReader.Commands.Tables;
using ScopeReader.Comparing;
using ScopeReader.Files.Output;

namespace ScopeReader.Commands;

/// <summary>A form of <c>compare</c>'s results.</summary>
internal enum CompareForm
{
    /// <summary>For people.</summary>
    Table,

    /// <summary>One JSON document.</summary>
    Json,

    /// <summary>A row a difference.</summary>
    Csv,
}

/// <summary>One run of <c>compare</c>.</summary>
/// <param name="Surroundings">What it writes to.</param>
/// <param name="Plan">The plan of the reference, and of the others unless they have their own.</param>
/// <param name="OtherPlan">The others' plan, where they were taken through another chain.</param>
/// <param name="Channel">Compare only this channel; null for all.</param>
/// <param name="Added">The capacitor that was added; null for none.</param>
internal sealed record CompareRun(Surroundings Surroundings, Plan Plan, Plan? OtherPlan, string? Channel, AddedCapacitor? Added)
{
    /// <summary>Measures the sides, compares them and writes what was found.</summary>
    /// <returns>The exit status.</returns>
    public int Compare(string[][] sides, CompareForm form, CancellationToken cancellation)
    {
        using ProgressLine progress = Surroundings.Progress(cancellation);
        MeasuredFile[][] measured = [.. sides.Select((side, i) => side.Select(f => CaptureMeasurer.Measure(f, i == 0 ? Plan : OtherPlan ?? Plan, Channel, progress, cancellation)).ToArray())];
        progress.Hide();
        MeasuredFile[] all = [.. measured.SelectMany(side => side)];
        Outcome worst = Outcome.Unjudged;
        foreach (MeasuredFile file in all)
        {
            worst = MeasuredFile.Worst(worst, file.Outcome);
            if (file.Error is not null)
                Surroundings.Error.WriteLine(SafeText.Of(file.Error));
        }
        Comparison? comparison = Of(measured);
        switch (form)
        {
            case CompareForm.Json:
                Surroundings.Output.Write(ComparisonJson.Document(CommandLine.ProgramAndVersion, all, comparison) + "\n");
                break;
            case CompareForm.Csv:
                ComparisonCsv.Write(Surroundings.Output, comparison?.Differences ?? []);
                break;
            default:
                if (comparison is not null)
                    Surroundings.Output.Write(ComparisonTable.Of(comparison, Surroundings.Width(), Surroundings.Colour));
                break;
        }
        Surroundings.Output.Flush();
        return ExitStatus.Of(worst);
    }

    // A side is what of it could be read; without the reference, or with nothing beside it, there is nothing to compare.
    private Comparison? Of(MeasuredFile[][] measured)
    {
        ComparedSide[] sides = [.. measured.Select(side => new ComparedSide([.. side.Select(f => f.Measurement).OfType<Measurement>()])).Where((side, i) => i == 0 || side.Captures.Count > 0)];
        if (sides is not [{ Captures.Count: > 0 } reference, _, ..])
            return null;
        Comparison comparison = Comparison.Of(reference, sides[1..], OtherPlan is null);
        return Added is null ? comparison : Added.Tell(comparison);
    }
}
