using System.Globalization;
using System.Text;
using ScopeReader.Commands.Tables;
using ScopeReader.Files.Output;
using ScopeReader.Files.Plans;
using ScopeReader.Frequency;
using ScopeReader.Readings;

namespace ScopeReader.Commands;

/// <summary>One run of <c>calibrate</c>.</summary>
/// <param name="Surroundings">What it writes to, and which day it is.</param>
/// <param name="Plan">How the capture is read; its timebase keys do not count.</param>
/// <param name="Channel">The channel that the reference is on; null where there is one.</param>
/// <param name="Reference">The reference's frequency, Hz.</param>
/// <param name="ReferencePpm">Its standard uncertainty, ppm.</param>
/// <param name="AgeingPpmPerYear">Bound of the change with time; null where none was given.</param>
/// <param name="Into">The plan that the keys are written into; null to print them.</param>
internal sealed record CalibrateRun(Surroundings Surroundings, Plan Plan, string? Channel, double Reference, double ReferencePpm, double? AgeingPpmPerYear, string? Into)
{
    /// <summary>Measures the reference and writes the keys.</summary>
    /// <returns>The exit status.</returns>
    public int Calibrate(string file, CancellationToken cancellation)
    {
        // A plan that cannot be written into is found before anything is measured.
        string? text = Into is null ? null : ReadPlan(Into);
        Plan indicating = Plan with { Limits = [], Chain = TimebaseCalibration.Uncorrected(Plan.Chain) };
        using ProgressLine progress = Surroundings.Progress(cancellation);
        MeasuredFile measured = CaptureMeasurer.Measure(file, indicating, Channel, progress, cancellation);
        progress.Hide();
        if (measured.Measurement is not { } measurement)
            return Failed(measured.Error!);
        ChannelMeasurement[] with = [.. measurement.Channels.Where(c => Frequency(c) is not null)];
        if (with.Length == 0)
            return Failed($"{file}: no frequency to hold against the reference: {measurement.Channels.SelectMany(c => c.NotMeasured).FirstOrDefault(n => n.Quantity == Quantities.Frequency)?.Reason ?? "it is no waveform"}");
        if (with.Length > 1)
            return Failed($"{file}: expected the reference alone, found a frequency on {string.Join(", ", with.Select(c => c.Channel.Name))}. Name its channel with --channel.");
        Reading reading = Frequency(with[0])!;
        if (reading.Unit != "Hz")
            return Failed($"{file}: the file states no sample interval; give it with --interval or --rate");
        TimebaseCalibration found = TimebaseCalibration.Of(reading, Reference, ReferencePpm);
        if (Math.Abs(found.ReadsPpm) > TimebaseCalibration.MostPpm)
            return Failed($"{file}: expected {Engineering.Given(Reference, "Hz")}, found {Engineering.Format(reading.Value, "Hz", 7)}: further off than a timebase errs. Check --reference, and that the reference is on this channel.");

        foreach (Finding finding in with[0].Findings.Where(f => f.Code is SteadinessFindings.Code or "near-commensurate-sampling" or "few-cycles" or "frequency-methods-differ"))
            Surroundings.Error.WriteLine(SafeText.Of($"{file}: {finding.Text}"));
        (string Key, string Value)[] keys = Keys(found);
        Surroundings.Output.WriteLine(SafeText.Of(Summary(found, reading)));
        if (text is null)
        {
            Surroundings.Output.WriteLine("[chain]");
            foreach ((string key, string value) in keys)
                Surroundings.Output.WriteLine($"{key} = {value}");
        }
        else
        {
            WritePlan(Into!, PlanEditor.SetInChain(text, Into!, keys));
            Surroundings.Output.WriteLine(SafeText.Of($"# written into {Into}: {string.Join(", ", keys.Select(k => $"{k.Key} = {k.Value}"))}"));
        }
        Surroundings.Output.Flush();
        return ExitStatus.Passed;
    }

    private static Reading? Frequency(ChannelMeasurement channel) => channel.Readings.FirstOrDefault(r => r.IsPrimary && r.Quantity == Quantities.Frequency);

    private string Summary(TimebaseCalibration found, Reading reading) => string.Create(CultureInfo.InvariantCulture,
        $"# {Engineering.Given(Reference, "Hz")} is shown as {Engineering.Format(reading.Value, reading.Budget.ExpandedUncertainty, "Hz")}: this timebase reads {(found.ReadsPpm < 0 ? "low" : "high")} by {Engineering.Format(Math.Abs(found.ReadsPpm), 2 * found.UncertaintyPpm, "ppm")}; standard uncertainty {found.UncertaintyPpm:G2} ppm, of which the capture {found.CapturePpm:G2} ppm and the reference {ReferencePpm:G2} ppm");

    private (string Key, string Value)[] Keys(TimebaseCalibration found)
    {
        // Two digits of the uncertainty, rounded up, and as many places of the value.
        int places = found.UncertaintyPpm > 0 ? Math.Clamp(1 - (int)Math.Floor(Math.Log10(found.UncertaintyPpm)), 0, 12) : 6;
        double step = Math.Pow(10, -places);
        var keys = new List<(string, string)>
        {
            ("timebase-reads", Quoted(Math.Round(found.ReadsPpm / step) * step, places, "ppm")),
            ("timebase-uncertainty", Quoted(Math.Ceiling(found.UncertaintyPpm / step - 1e-9) * step, places, "ppm")),
            ("timebase-calibrated", Surroundings.Today.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture)),
        };
        if (AgeingPpmPerYear is { } ageing)
            keys.Add(("timebase-ageing", $"\"{Engineering.Given(ageing, "ppm/year")}\""));
        return [.. keys];
    }

    private static string Quoted(double value, int places, string unit) => $"\"{value.ToString("F" + places, CultureInfo.InvariantCulture)} {unit}\"";

    private int Failed(string message)
    {
        Surroundings.Error.WriteLine(SafeText.Of(message));
        return ExitStatus.Unreadable;
    }

    private static string ReadPlan(string path)
    {
        PlanReader.ReadFile(path);
        return File.ReadAllText(path);
    }

    // Beside the old one and then in its place: a full disk must not cost the person a plan.
    private static void WritePlan(string path, string text)
    {
        string target = File.ResolveLinkTarget(path, returnFinalTarget: true)?.FullName ?? path, fresh = target + ".new";
        File.WriteAllText(fresh, text, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false));
        File.Move(fresh, target, overwrite: true);
    }
}
