using ScopeReader.Signals;

namespace ScopeReader.DemoCaptures;

/// <summary>The instruments of the invented workshop.</summary>
internal static class Bench
{
    /// <summary>How far the timebase of the eight-bit instrument reads high, ppm. Its data sheet says ±25; nobody there knows more.</summary>
    public const double TimebaseReadsPpm = 12;

    /// <summary>An eight-bit instrument; its input noise is about half a code.</summary>
    /// <param name="start">Instant of the first sample, s; the trigger is at 0.</param>
    /// <param name="interval">Sample interval, s.</param>
    /// <param name="count">How many samples.</param>
    /// <param name="bottom">Lowest voltage on its screen.</param>
    /// <param name="step">One code, V.</param>
    /// <param name="seed">Of the noise.</param>
    public static Recording EightBit(decimal start, decimal interval, int count, double bottom, double step, ulong seed) => new()
    {
        Start = (double)start,
        Interval = (double)interval,
        Count = count,
        TimebaseReadsPpm = TimebaseReadsPpm,
        Noise = 0.5 * step,
        Converter = new Converter(8, bottom, bottom + 256 * step),
        Seed = seed,
    };
}
