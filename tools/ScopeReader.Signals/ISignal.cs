namespace ScopeReader.Signals;

/// <summary>A voltage that is known at every instant.</summary>
public interface ISignal
{
    /// <summary>Value at an instant.</summary>
    /// <param name="time">True seconds from the signal's own origin.</param>
    double At(double time);
}
