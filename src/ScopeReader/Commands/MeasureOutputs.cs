using ScopeReader.Commands.Tables;
using ScopeReader.Files.Output;

namespace ScopeReader.Commands;

/// <summary>The table for people.</summary>
internal sealed class TableOutput(MeasureRun run) : IMeasureOutput
{
    private readonly List<(string Word, string File)> _files = [];
    private bool _started;

    public bool InOrder => true;

    public void Write(MeasuredFile file)
    {
        _files.Add((Phrases.Of(file), SafeText.Of(file.File)));
        if (file.Measurement is not { } measurement)
            return;
        Surroundings to = run.Surroundings;
        if (_started)
            to.Output.Write("\n\n");
        _started = true;
        to.Output.Write(MeasurementTable.Of(measurement, run.Plan, run.Explain, to.Width(), to.Colour));
    }

    // The tables have scrolled away by then: what each file came to stays in view.
    public void Finish()
    {
        if (_files.Count < 2 || !_started)
            return;
        var sheet = new Sheet(run.Surroundings.Width(), run.Surroundings.Colour);
        sheet.Heading("All files");
        sheet.Columns([.. _files.Select(f => new[] { f.Word, f.File })]);
        run.Surroundings.Output.Write("\n\n" + sheet);
    }
}

/// <summary>The verdicts, a line each.</summary>
internal sealed class QuietOutput(MeasureRun run) : IMeasureOutput
{
    public bool InOrder => true;

    public void Write(MeasuredFile file)
    {
        if (file.Measurement is not { } measurement)
            return;
        foreach (ChannelMeasurement channel in measurement.Channels)
            foreach (Limits.Verdict verdict in channel.Verdicts)
                run.Surroundings.Output.Write(VerdictSection.Line(file.File, channel, verdict) + "\n");
        if (MeasurementTable.NoneApplied(measurement, run.Plan) is { } none)
            run.Surroundings.Output.Write($"{none} ({SafeText.Of(file.File)})\n");
    }

    public void Finish()
    {
    }
}

/// <summary>One JSON document.</summary>
internal sealed class JsonOutput(MeasureRun run) : IMeasureOutput
{
    private readonly MeasurementJson _json = new(CommandLine.ProgramAndVersion, run.Explain);

    public bool InOrder => true;

    public void Write(MeasuredFile file) => _json.Add(file);

    public void Finish() => run.Surroundings.Output.Write(_json.Document() + "\n");
}

/// <summary>A JSON object a line.</summary>
internal sealed class JsonLinesOutput(MeasureRun run) : IMeasureOutput
{
    public bool InOrder => false;

    public void Write(MeasuredFile file)
    {
        run.Surroundings.Output.Write(MeasurementJson.Line(file, run.Explain) + "\n");
        run.Surroundings.Output.Flush();
    }

    public void Finish()
    {
    }
}

/// <summary>CSV, a row a reading.</summary>
internal sealed class CsvOutput(MeasureRun run) : IMeasureOutput
{
    private bool _started;

    public bool InOrder => true;

    public void Write(MeasuredFile file)
    {
        Start();
        MeasurementCsv.Write(run.Surroundings.Output, file);
    }

    public void Finish() => Start();

    // A run of nothing but unreadable files is still a CSV file: its header.
    private void Start()
    {
        if (!_started)
            MeasurementCsv.WriteHeader(run.Surroundings.Output);
        _started = true;
    }
}
