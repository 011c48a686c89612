using ScopeReader.Signals;

namespace ScopeReader.DemoCaptures;

/// <summary>Logic nodes: one on a breadboard and on a soldered board, one with a slow edge, and a divider.</summary>
internal static class Nodes
{
    private const decimal Start = -1e-6m, Interval = 2e-9m;

    // Long jumpers and the strips' capacitance: low and lightly damped.
    public static byte[] Breadboard() => Node(new Resonance(11.2e6, 0.085, 0.5), 81);

    // The same driver, a tenth of the loop: high, and half lost in the edge.
    public static byte[] Soldered() => Node(new Resonance(37e6, 0.2, 0.5), 82);

    private static byte[] Node(Resonance resonance, ulong seed)
    {
        var wave = new SquareWave
        {
            Frequency = 503.46e3,
            Low = 0.05,
            High = 3.3,
            DutyFactor = 0.503,
            RiseTime = 14e-9,
            FallTime = 13e-9,
            Resonance = resonance,
        };
        Recording recording = Bench.EightBit(Start, Interval, 20_000, -1.6, 0.025, seed);
        return Table.Timed("Time (s),Node (V)", Start, Interval, 3, recording.Samples(wave.Signal));
    }

    /// <summary>An open-collector output that a resistor pulls up into the capacitance of a long cable.</summary>
    public static byte[] SlowEdge()
    {
        const decimal start = -4e-6m, interval = 5e-9m;
        var edge = new SinglePoleEdge { Low = 0.14, High = 3.28, TimeConstant = 547e-9, EdgeSigma = 8e-9 };
        Recording recording = Bench.EightBit(start, interval, 4_000, -0.96, 0.02, 83);
        return Table.Timed("Time (s),Output (V)", start, interval, 2, recording.Samples(edge));
    }

    /// <summary>A clock and two stages of a divider, each a little later than the one before.</summary>
    public static byte[] Divider()
    {
        const decimal start = 0, interval = 10e-9m;
        double[][] channels = new double[3][];
        for (int i = 0; i < channels.Length; i++)
        {
            var wave = new SquareWave { Frequency = 1.82e6 * (1 + 17e-6) / (1 << i), Low = 0.04, High = 3.26, RiseTime = 32e-9, FallTime = 30e-9 };
            Recording recording = Bench.EightBit(start, interval, 12_000, -0.96, 0.02, (ulong)(84 + i)) with { Delay = 210e-9 - i * 24e-9 };
            channels[i] = recording.Samples(wave.Signal);
        }
        return Table.Timed("Time (s),Clock (V),Half (V),Quarter (V)", start, interval, 2, channels);
    }
}
