namespace ScopeReader.Signals;

/// <summary>An analogue-to-digital converter: codes 0 to 2^bits − 1, each rounded to, clipped at the ends.</summary>
/// <param name="Bits">1 to 24.</param>
/// <param name="Low">Value of code 0, V.</param>
/// <param name="High">Value of one code beyond the last, V.</param>
public sealed record Converter(int Bits, double Low, double High)
{
    /// <summary>One code, V.</summary>
    public double Step => (High - Low) / (1 << Bits);

    /// <summary>The value that a voltage is converted to.</summary>
    public double Convert(double value) => Low + Step * Math.Clamp(Math.Round((value - Low) / Step), 0, (1 << Bits) - 1);
}
