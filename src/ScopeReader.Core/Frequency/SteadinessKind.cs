namespace ScopeReader.Frequency;

/// <summary>In which way a record is or is not one steady wave.</summary>
public enum SteadinessKind
{
    /// <summary>Too few cycles to tell.</summary>
    Untested,

    /// <summary>Nothing but noise parts the record from one periodic wave.</summary>
    Steady,

    /// <summary>The frequency moves one way through the record.</summary>
    Drifting,

    /// <summary>The phase goes to and fro.</summary>
    PhaseModulated,

    /// <summary>The wave grows and shrinks.</summary>
    AmplitudeModulated,

    /// <summary>Two lines stand beside the wave, as far above it as below: modulation faster than its parts show.</summary>
    Modulated,

    /// <summary>The wave is there for a part of the record only.</summary>
    Interrupted,

    /// <summary>A line stands beside the wave that is none of its harmonics.</summary>
    SecondTone,

    /// <summary>No one period describes the record.</summary>
    NotPeriodic,
}
