using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Harmonics;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>Two spectra of one source, or a waveform and a spectrum trace of it, line by line.</summary>
/// <remarks>
/// A waveform and a trace come from two instruments: both chains' terms count. What is compared is what both have: the frequency,
/// the level of the fundamental, each harmonic in dBc.
/// </remarks>
internal static class LineComparison
{
    private const int MostNamed = 6;

    /// <summary>Differences of a waveform and a trace; none where the two are of one kind.</summary>
    /// <param name="reference">The reference's channel.</param>
    /// <param name="compared">The compared one.</param>
    /// <param name="file">The compared file.</param>
    public static IReadOnlyList<Difference> Across(ChannelMeasurement reference, ChannelMeasurement compared, string file)
    {
        if (reference.Channel is Waveform == compared.Channel is Waveform)
            return [];
        var differences = new List<Difference>();
        Add(Quantities.Frequency, Quantities.PeakFrequency);
        Add(Quantities.FundamentalPower, Quantities.PeakPower);
        Add(Quantities.FundamentalLevel, Quantities.PeakLevel);
        for (int k = 2; k <= Quantities.HighestHarmonic; k++)
            Add(Quantities.Harmonic(k), Quantities.Harmonic(k));
        Add(Quantities.WorstHarmonic, Quantities.WorstHarmonic);
        return differences;

        void Add(Quantity ofWaveform, Quantity ofTrace)
        {
            bool first = reference.Channel is Waveform;
            if (reference.Primary(first ? ofWaveform : ofTrace) is not { } a || compared.Primary(first ? ofTrace : ofWaveform) is not { } b || a.Unit != b.Unit)
                return;
            // The strongest line of a trace is its fundamental or not: then its frequency and level are another's.
            if (ofTrace != ofWaveform && !IsSameLine(reference, compared))
                return;
            var budget = new Budget([.. a.Budget.Terms, .. b.Budget.Terms], [.. a.Budget.Missing, .. b.Budget.Missing]);
            differences.Add(new Difference(ofWaveform, a.Unit, file, compared.Channel.Name, a.Value, b.Value, budget, 1, 1));
        }
    }

    /// <summary>What the lines say: how many agree, and which only one of two traces has.</summary>
    public static IEnumerable<Finding> Findings(ChannelMeasurement reference, ChannelMeasurement compared, IReadOnlyList<Difference> differences)
    {
        Difference[] lines = [.. differences.Where(d => d.Quantity.Id.StartsWith("harmonic-", StringComparison.Ordinal))];
        if (reference.Channel is SpectrumTrace || compared.Channel is SpectrumTrace)
        {
            string[] apart = [.. lines.Where(d => d.IsSignificant == true).Select(d => string.Create(CultureInfo.InvariantCulture, $"{d.Quantity.Id} ({d.Change:+0.0;-0.0} dB)"))];
            if (lines.Length > 0)
                yield return new Finding("lines", apart.Length == 0
                    ? $"{lines.Length} harmonics were compared line by line, and none differs by more than its uncertainty"
                    : $"of {lines.Length} harmonics compared line by line, {string.Join(", ", apart)} differ by more than their uncertainty", apart.Length == 0 ? "agree" : "differ");
        }
        if (reference.Channel is SpectrumTrace a && compared.Channel is SpectrumTrace b && TraceLevels.Of(a) is { } before && TraceLevels.Of(b) is { } after && before.Unit == after.Unit)
        {
            if (Alone(before, after) is { Length: > 0 } gone)
                yield return new Finding("lines-gone", $"only the reference shows {gone}", "gone");
            if (Alone(after, before) is { Length: > 0 } came)
                yield return new Finding("lines-new", $"the reference does not show {came}", "new");
        }
    }

    private static bool IsSameLine(ChannelMeasurement a, ChannelMeasurement b)
    {
        (ChannelMeasurement waveform, ChannelMeasurement trace) = a.Channel is Waveform ? (a, b) : (b, a);
        return waveform.Primary(Quantities.Frequency) is { Unit: "Hz" } f && trace.Primary(Quantities.PeakFrequency) is { } peak && Math.Abs(peak.Value / f.Value - 1) < 0.01;
    }

    // Lines of one trace that another would show, were they there: inside its span, and above what its noise hides.
    private static string Alone(TraceLevels has, TraceLevels lacks)
    {
        IReadOnlyList<TraceLine> others = TraceLineList.Of(lacks, lacks.AfterFeedThrough());
        double reach = 2 * Math.Max(has.Spacing, lacks.Spacing);
        var alone = new List<TraceLine>();
        foreach (TraceLine line in TraceLineList.Of(has, has.AfterFeedThrough()))
            if (line.Frequency > lacks.Start + reach && line.Frequency < lacks.Stop - reach && !others.Any(o => Math.Abs(o.Frequency - line.Frequency) < reach)
                && line.LevelDb > lacks.Noise(lacks.Nearest(line.Frequency)).Threshold(lacks.Count)
                && line.LevelDb > lacks.Level(lacks.Highest(lacks.Nearest(line.Frequency - reach), lacks.Nearest(line.Frequency + reach))) + 3)
                alone.Add(line);
        return string.Join(", ", alone.OrderByDescending(l => l.LevelDb).Take(MostNamed)
            .Select(l => string.Create(CultureInfo.InvariantCulture, $"a line at {Engineering.Format(l.Frequency, "Hz", 5)} ({l.LevelDb:F1} {has.Unit})")))
            + (alone.Count > MostNamed ? string.Create(CultureInfo.InvariantCulture, $" and {alone.Count - MostNamed} weaker") : "");
    }
}
