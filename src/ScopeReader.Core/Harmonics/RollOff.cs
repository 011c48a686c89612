using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>What the stated bandwidth of the chain leaves unknown of a harmonic's level.</summary>
/// <remarks>
/// A response that is 3.01 dB down at B loses 3.01·(f/B)² dB at f if it is Gaussian, and less below B if it is flatter: that is
/// taken as the bound of the error beyond 0.3 B, where it reaches 0.27 dB. Below that the plan's flatness holds.
/// </remarks>
internal sealed class RollOff
{
    /// <summary>Share of the bandwidth from which roll-off counts.</summary>
    public const double Onset = 0.3;

    private const double HalfPower = 3.010299956639812;

    private readonly double? _frequency;

    public RollOff(MeasuringChain chain, double? fundamental)
    {
        _frequency = fundamental;
        double square = 0;
        foreach (double? bandwidth in (ReadOnlySpan<double?>)[chain.InputBandwidth, chain.ProbeBandwidth])
            if (bandwidth is { } b)
                square += 1 / (b * b);
        Bandwidth = square > 0 ? 1 / Math.Sqrt(square) : null;
    }

    /// <summary>Bandwidth of input and probe together, Hz; null where none is stated.</summary>
    public double? Bandwidth { get; }

    /// <summary>True where a harmonic lies in the roll-off.</summary>
    public bool Reaches(int order) => _frequency * order > Onset * Bandwidth;

    /// <summary>The term of a level, relative to the fundamental's but for the fundamental's own; none where the harmonic is well inside.</summary>
    public IEnumerable<BudgetTerm> Terms(int order)
    {
        if (!Reaches(order) || _frequency is not { } f || Bandwidth is not { } b)
            yield break;
        double loss = HalfPower * (f / b) * (f / b) * (order == 1 ? 1 : (double)order * order - 1);
        yield return BudgetTerm.Rectangular("roll-off", loss, ofChain: true);
    }
}
