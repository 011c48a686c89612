using ScopeReader.Bench.Pages;
using ScopeReader.Bench.Plots;
using ScopeReader.Bench.Work;
using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Bench;

/// <summary>Captures and measurements made by hand: what the screen shows must not hang on what the analysers find.</summary>
internal static class Made
{
    public static readonly Plan Plan = new() { Subject = "IF source, board 7", Nominal = 455e3, Limits = [new Limit(Quantities.FrequencyError, -50, 50), new Limit(Quantities.RiseOvershoot, null, 12)] };

    /// <summary>A 455 kHz square wave of 3.3 V that rings at 9 MHz, 10 ns apart.</summary>
    public static Waveform Ringing(int count = 1000, string name = "CH1") => new Recording { Interval = 10e-9, Count = count, Start = -1e-6 }
        .Take(new SquareWave { High = 3.3, RiseTime = 30e-9, Resonance = new Resonance(9e6, 0.12, 0.5) }.Signal, name);

    public static SpectrumTrace Lines() => new("trace 1", "dBm", [.. Enumerable.Range(0, 401).Select(i => 5e3 * i)],
        [.. Enumerable.Range(0, 401).Select(i => i switch { 91 => -7.0, 182 => -32.0, 273 => -17.5, _ => -80.0 + i % 3 })]);

    public static Capture Capture(string file, params Channel[] channels) => new(file, new string('0', 64), channels, []);

    public static Reading Reading(Quantity quantity, double value, double halfWidth, string method = "crossings", params string[] missing) =>
        new(quantity, value, quantity.Unit, new Budget([BudgetTerm.Rectangular("timebase", halfWidth, ofChain: true)], missing), method) { Count = 910 };

    /// <summary>A measurement of <see cref="Ringing"/> with one verdict of each kind that it can have.</summary>
    public static Measurement Measurement(Capture capture, Plan plan)
    {
        Reading error = Reading(Quantities.FrequencyError, 27.05, 25), overshoot = Reading(Quantities.RiseOvershoot, 14.2, 0.8, "mean of edges");
        Reading[] readings =
        [
            Reading(Quantities.Frequency, 455012.3, 11.4), error, Reading(Quantities.Period, 2.197743e-6, 55e-12),
            Reading(Quantities.HighLevel, 3.301, 0.066, "histogram", "offset"), Reading(Quantities.LowLevel, 0.002, 0.066, "histogram", "offset"),
            Reading(Quantities.RiseTime, 38.4e-9, 1.2e-9), overshoot, Reading(Quantities.RingingFrequency, 8.935e6, 21e3, "damped-sinusoid-fit"),
        ];
        ChannelMeasurement channel = new(capture.Channels[0], readings,
            [new NotMeasured(Quantities.FallTime, "no-edge", "no fall through the 10 % level in 1000 samples; capture a whole period")],
            [new Finding("ringing-kind", "Ringing starts at each edge and decays: it is not an oscillation of its own. Try a shorter ground lead first.", "edge-excited")],
            [.. plan.Limits.Select(l => Judge.Reading(l, l.Quantity == Quantities.FrequencyError ? error : overshoot))]);
        ChannelMeasurement[] others = [.. capture.Channels.Skip(1).Select(c => new ChannelMeasurement(c, [], [], [], []))];
        return new Measurement(capture, [channel, .. others], [Cautions.Probe], Outcome.Fail);
    }

    public static OpenCapture Measured(string file, params Channel[] channels)
    {
        Capture capture = Capture(file, channels);
        var open = new OpenCapture(file);
        open.WasRead(capture, [.. channels.Select(PlotSource.Of)]);
        open.WasMeasured(Measurement(capture, Plan));
        return open;
    }

    /// <summary>A bench that reads nothing by itself: tests bring its captures on.</summary>
    public static (PageStack Pages, Workbench Bench) Bench(params string[] files)
    {
        var bench = new Workbench(Plan, "plans/if-source.toml", (_, cancellation) =>
        {
            cancellation.WaitHandle.WaitOne();
            throw new OperationCanceledException();
        }, _ => null, action => { });
        foreach (string file in files)
            bench.Open(file);
        bench.Select(0);
        return (new PageStack(bench), bench);
    }

    /// <summary>The bench that most pictures show: a measured capture with two channels, one being measured, one waiting, one unreadable.</summary>
    public static (PageStack Pages, Workbench Bench) FullBench()
    {
        (PageStack pages, Workbench bench) = Bench("captures/ringing.csv", "captures/soldered.csv", "captures/third.csv", "captures/letter.csv");
        Bring(bench.Captures[0], Ringing(), Ringing(500, "CH2"));
        Capture second = Capture("captures/soldered.csv", Lines());
        bench.Captures[1].WasRead(second, [PlotSource.Of(second.Channels[0])]);
        bench.Captures[1].Progressed(0.4);
        bench.Captures[3].Failed("captures/letter.csv, line 1: expected numbers in columns, found \"Dear Sir\". Export the capture as CSV.");
        return (pages, bench);
    }

    public static void Bring(OpenCapture open, params Channel[] channels)
    {
        Capture capture = Capture(open.Path, channels);
        open.WasRead(capture, [.. channels.Select(PlotSource.Of)]);
        open.WasMeasured(Measurement(capture, Plan));
    }
}
