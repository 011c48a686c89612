using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>How a spectrum trace is measured.</summary>
public static class SpectrumAnalysis
{
    /// <summary>Runs every analyser that suits the trace.</summary>
    public static void Measure(SpectrumTrace trace, Plan plan, ReadingSheet sheet)
    {
        ArgumentNullException.ThrowIfNull(trace);
        ArgumentNullException.ThrowIfNull(plan);
        ArgumentNullException.ThrowIfNull(sheet);
    }
}
