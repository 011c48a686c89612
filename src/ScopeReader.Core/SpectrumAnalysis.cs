using ScopeReader.Captures;
using ScopeReader.Harmonics;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>How a spectrum trace is measured: its strongest line, the harmonics of its fundamental, the deviation from nominal.</summary>
/// <remarks>
/// The top of a line is a parabola through three levels in dB; the noise around it is subtracted in power. Levels stay on the
/// scale of the file: V and dBµV are carried to dBV and W to dBm exactly; between dBV and dBm nothing is converted, for that needs an impedance.
/// </remarks>
public static class SpectrumAnalysis
{
    /// <summary>Runs every analyser that suits the trace.</summary>
    /// <param name="trace">The trace.</param>
    /// <param name="plan">The plan: nominal, chain, how many harmonics.</param>
    /// <param name="sheet">Where readings, reasons and findings go.</param>
    public static void Measure(SpectrumTrace trace, Plan plan, ReadingSheet sheet)
    {
        ArgumentNullException.ThrowIfNull(trace);
        ArgumentNullException.ThrowIfNull(plan);
        ArgumentNullException.ThrowIfNull(sheet);
        new TraceReport(trace, plan, sheet).Write();
    }
}
