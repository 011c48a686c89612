using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files.Axes;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;
using ScopeReader.Readings;

namespace ScopeReader.Files;

/// <summary>Makes channels of a block of numbers.</summary>
internal sealed class ChannelBuilder(string file, Table table, ImportSettings settings, double scale, List<string> doubts)
{
    private const double Jitter = 0.1;

    private readonly List<Channel> _channels = [];
    private readonly List<ChannelReport> _reports = [];

    /// <summary>The channels.</summary>
    public IReadOnlyList<Channel> Channels => _channels;

    /// <summary>What there is to say of them.</summary>
    public IReadOnlyList<ChannelReport> Reports => _reports;

    /// <summary>The axis of the first channel.</summary>
    public AxisReport Axis { get; private set; } = new(AxisSource.None, "sample", null, null, null, null);

    /// <summary>Builds them.</summary>
    /// <exception cref="ImportException">The axis is no axis.</exception>
    public void Build()
    {
        int x = Array.FindIndex(table.Roles, r => r is ColumnRole.Time or ColumnRole.Frequency);
        bool isSpectrum = x >= 0 && table.Roles[x] == ColumnRole.Frequency;
        TimeAxis axis = isSpectrum ? TimeAxis.PerSample : TimeAxisOf(x);
        int number = 0;
        for (int i = 0; i < table.Roles.Length; i++)
        {
            if (table.Roles[i] != ColumnRole.Value)
                continue;
            number++;
            Label label = table.Header.Labels[i];
            string name = Name(i, label, number);
            string unit = label.Unit ?? "";
            double factor = label.Factor;
            if (settings.Units is { } units && table.Shape.Columns[i] < units.Count && UnitWords.TryRead(units[table.Shape.Columns[i]], out double given, out string named))
                (factor, unit) = (given, named);
            if (isSpectrum)
                AddSpectrum(name, unit, factor, x, i);
            else
                AddWaveform(name, unit, factor, axis, i);
        }
        if (_channels.Count == 0)
            throw new ImportException(file, "expected a column of samples beside the axis, found none. Name the columns under [import].", table.FirstLine);
    }

    private string Name(int i, Label label, int number)
    {
        int c = table.Shape.Columns[i];
        if (settings.Columns is { } given && c < given.Count && given[c].Length > 0)
            return given[c];
        return label.Name.Length > 0 ? Excerpt.Of(label.Name) : string.Create(CultureInfo.InvariantCulture, $"channel {number}");
    }

    private TimeAxis TimeAxisOf(int x)
    {
        if (settings.Interval is { } stated)
        {
            Axis = new AxisReport(AxisSource.Option, "s", stated, stated, stated, null);
            return new TimeAxis(0, stated, AxisSource.Option);
        }
        if (x < 0)
        {
            doubts.Add("the file states no sample interval: readings are per sample until --interval or --rate is given");
            return TimeAxis.PerSample;
        }
        Label label = table.Header.Labels[x];
        if (label.Unit is null or "")
            doubts.Add($"the unit of the times ({(label.Name.Length > 0 ? Excerpt.Of(label.Name, 20) : "the first column")}) is not stated: taken as seconds");
        SpacingFit fit = table.Spacings[x];
        Spacing spacing = fit.Fit() ?? Uneven(fit.Nearest());
        double factor = label.Factor;
        if (spacing.Interval <= 0)
            throw new ImportException(file, $"expected times that rise, found a step of {Engineering.Format(spacing.Interval * factor, "s")}. Give --interval and name the columns under [import].", table.FirstLine, table.Shape.Columns[x] + 1);
        double interval = Scaled(spacing.Interval, factor), low = Scaled(spacing.Low, factor), high = Scaled(spacing.High, factor);
        Axis = new AxisReport(AxisSource.Column, "s", interval, low, high, Scaled(spacing.WorstDeviation, factor));
        if (low <= 0)
            throw new ImportException(file, $"expected times printed finely enough to tell samples apart, found steps of {Engineering.Format(interval, "s")} that could be 0. Give --interval.", table.FirstLine, table.Shape.Columns[x] + 1);
        return new TimeAxis(Scaled(spacing.Start, factor), interval, AxisSource.Column, low, high);
    }

    private Spacing Uneven(Spacing nearest)
    {
        if (nearest.WorstDeviation > Jitter * Math.Abs(nearest.Interval))
            throw new ImportException(file, FormattableString.Invariant($"expected evenly spaced times, found steps that leave an even spacing by {nearest.WorstDeviation / Math.Abs(nearest.Interval):G3} of one. Export the samples as they were taken, or give --interval."), table.FirstLine);
        doubts.Add(FormattableString.Invariant($"the times leave an even spacing by up to {100 * nearest.WorstDeviation / nearest.Interval:G2} % of an interval; one interval was fitted"));
        return nearest;
    }

    private void AddWaveform(string name, string unit, double factor, TimeAxis axis, int i)
    {
        SampleColumn column = table.Columns[i];
        (int start, int length) = LongestWhole(column.Values);
        if (length == 0)
            throw new ImportException(file, $"expected numbers in {name}, found none. Leave the column out under [import].", table.FirstLine, table.Shape.Columns[i] + 1);
        NoteMissing(name, column, start, length);
        double[] samples = column.Values.Slice(start, length).ToArray();
        Scale(samples, factor);
        TimeAxis own = start == 0 ? axis : axis.IsTimed ? new TimeAxis(axis.Start + start * axis.Interval, axis.Interval, axis.Source, axis.IntervalLow, axis.IntervalHigh) : axis;
        _channels.Add(new Waveform(name, unit, own, samples));
        Report(name, "waveform", unit, samples, column.Missing);
    }

    private void NoteMissing(string name, SampleColumn column, int start, int length)
    {
        if (column.Missing == 0)
            return;
        int first = column.Values.IndexOfAnyExceptInRange(double.NegativeInfinity, double.PositiveInfinity);
        doubts.Add(FormattableString.Invariant($"{name}: {column.Missing} of {column.Count} samples are missing or over range, the first is sample {first + 1}; measured is the longest stretch without them, samples {start + 1} to {start + length}"));
    }

    private static (int Start, int Length) LongestWhole(ReadOnlySpan<double> values)
    {
        int bestStart = 0, best = 0, start = 0;
        for (int i = 0; i <= values.Length; i++)
        {
            if (i < values.Length && !double.IsNaN(values[i]))
                continue;
            if (i - start > best)
                (bestStart, best) = (start, i - start);
            start = i + 1;
        }
        return (bestStart, best);
    }

    private void AddSpectrum(string name, string unit, double factor, int x, int i)
    {
        ReadOnlySpan<double> f = table.Columns[x].Values, l = table.Columns[i].Values;
        var frequencies = new List<double>(f.Length);
        var levels = new List<double>(f.Length);
        double toHertz = table.Header.Labels[x].Factor;
        for (int k = 0; k < f.Length; k++)
        {
            if (double.IsNaN(f[k]) || double.IsNaN(l[k]))
                continue;
            double frequency = Scaled(f[k], toHertz);
            if (frequencies.Count > 0 && frequency <= frequencies[^1])
                throw new ImportException(file, $"expected frequencies that rise, found {Engineering.Format(frequency, "Hz", 9)} after {Engineering.Format(frequencies[^1], "Hz", 9)}. Export one trace a file.", table.FirstLine + k, table.Shape.Columns[x] + 1);
            frequencies.Add(frequency);
            levels.Add(l[k]);
        }
        if (levels.Count < 3)
            throw new ImportException(file, $"expected a spectrum trace of three points or more, found {levels.Count}. Export the whole trace.", table.FirstLine);
        if (table.Header.Labels[x].Unit is null or "")
            doubts.Add("the unit of the frequencies is not stated: taken as hertz");
        double[] scaled = [.. levels];
        if (unit.StartsWith("dB", StringComparison.Ordinal))
            ShiftDecibels(scaled);
        else
            Scale(scaled, factor);
        double step = (frequencies[^1] - frequencies[0]) / (frequencies.Count - 1);
        Axis = new AxisReport(AxisSource.Column, "Hz", step, step, step, null);
        _channels.Add(new SpectrumTrace(name, unit, [.. frequencies], scaled));
        int missing = f.Length - scaled.Length;
        if (missing > 0)
            doubts.Add(FormattableString.Invariant($"{name}: {missing} of {f.Length} points are missing; they were left out"));
        Report(name, "spectrum", unit, scaled, missing);
    }

    private void Report(string name, string kind, string unit, double[] samples, int missing) =>
        _reports.Add(new ChannelReport(name, kind, unit, 1, samples.Length, samples.Min(), samples.Max(), 0, missing));

    private void Scale(double[] samples, double factor)
    {
        if (factor == 1 && scale == 1)
            return;
        for (int k = 0; k < samples.Length; k++)
            samples[k] = Scaled(samples[k], factor) * scale;
    }

    private void ShiftDecibels(double[] levels)
    {
        if (scale == 1)
            return;
        double shift = 20 * Math.Log10(scale);
        for (int k = 0; k < levels.Length; k++)
            levels[k] += shift;
    }

    // A small prefix is divided by its exact inverse: 12.5 mV is then the double nearest to 0.0125.
    private static double Scaled(double value, double factor) => factor < 1 ? value / Math.Round(1 / factor) : value * factor;
}
