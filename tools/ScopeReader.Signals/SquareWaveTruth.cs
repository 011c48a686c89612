using System.Numerics;
using ScopeReader.Levels;

namespace ScopeReader.Signals;

/// <summary>Every quantity of a made square wave, from its closed form and roots of it.</summary>
internal static class SquareWaveTruth
{
    public static IReadOnlyDictionary<string, double> Of(SquareWave wave, LevelSettings settings)
    {
        Dictionary<string, double> truth = HarmonicTruth.Of(wave.Signal, settings);
        truth["high-level"] = wave.High;
        truth["low-level"] = wave.Low;
        truth["amplitude"] = wave.Amplitude;

        // Each edge is looked for from the middle of the state before it.
        double d = wave.DutyFactor, period = 1 / wave.Frequency;
        var rise = new EdgeTruth(wave, isRising: true, -(1 - d) / 2, settings);
        var fall = new EdgeTruth(wave, isRising: false, d / 2, settings);
        AddEdge(truth, "rise", rise, wave, settings);
        AddEdge(truth, "fall", fall, wave, settings);
        truth["high-width"] = (fall.Instant - rise.Instant) * period;
        truth["low-width"] = (1 - fall.Instant + rise.Instant) * period;
        truth["duty-factor"] = 100 * (fall.Instant - rise.Instant);

        if (wave.Resonance is { } resonance)
            AddRinging(truth, wave, resonance, rise.Instant, fall.Instant);
        return truth;
    }

    private static void AddEdge(Dictionary<string, double> truth, string name, EdgeTruth edge, SquareWave wave, LevelSettings settings)
    {
        double period = 1 / wave.Frequency, step = (settings.ReferenceHighPercent - settings.ReferenceLowPercent) / 100 * wave.Amplitude;
        truth[name + "-time"] = edge.Duration * period;
        truth[name + "-slew"] = (name == "fall" ? -step : step) / (edge.Duration * period);
        truth[name + "-overshoot"] = 100 * edge.Overshoot;
        truth[name + "-undershoot"] = 100 * edge.Undershoot;
        truth[name + "-preshoot"] = 100 * edge.Preshoot;
        truth[name + "-settling"] = edge.Settling * period;
    }

    private static void AddRinging(Dictionary<string, double> truth, SquareWave wave, Resonance resonance, double rise, double fall)
    {
        truth["ringing-frequency"] = resonance.DampedFrequency;
        truth["ringing-damping-ratio"] = resonance.DampingRatio;
        truth["ringing-q"] = 1 / (2 * resonance.DampingRatio);
        truth["ringing-decay-time"] = resonance.DecayTime;

        // What each edge starts adds to what is left of all the edges before it: a geometric series in the period. The
        // envelope is then carried from the middle of the edge that went in to the 50 % instant of the one that came out.
        double period = 1 / wave.Frequency, d = wave.DutyFactor;
        Complex p = resonance.Pole, up = resonance.Ringing(wave.RiseSigma), down = resonance.Ringing(wave.FallSigma);
        Complex again = 1 - Complex.Exp(p * period);
        Complex afterRise = (up - down * Complex.Exp(p * period * (1 - d))) / again;
        Complex afterFall = (down - up * Complex.Exp(p * period * d)) / again;
        double atRise = 100 * afterRise.Magnitude * Math.Exp(p.Real * period * rise);
        double atFall = 100 * afterFall.Magnitude * Math.Exp(p.Real * period * (fall - d));
        // Edges of different speed excite it differently: each fit has its own truth, and the rising edge's is the quantity's.
        truth["ringing-amplitude"] = truth["ringing-amplitude/rising-edge-fit"] = atRise;
        truth["ringing-amplitude/falling-edge-fit"] = atFall;
    }
}
