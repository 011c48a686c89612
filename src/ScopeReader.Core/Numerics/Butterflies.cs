using System.Runtime.CompilerServices;

namespace ScopeReader.Numerics;

/// <summary>Where one butterfly takes its inputs and puts its outputs.</summary>
internal ref struct Legs
{
    public ref double InRe, InIm, OutRe, OutIm, TwiddleRe, TwiddleIm;
    public nint In, InStep, Out, OutStep, Twiddle, TwiddleStep;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Split<T> Take<T>(int leg) where T : struct, ILanes<T> => Split<T>.Load(ref InRe, ref InIm, In + leg * InStep);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Put<T>(int leg, Split<T> value) where T : struct, ILanes<T> => value.Store(ref OutRe, ref OutIm, Out + leg * OutStep);

    /// <summary>Puts a value times the twiddle factor of its leg, one factor for all lanes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Turn<T>(int leg, Split<T> value) where T : struct, ILanes<T> =>
        Put(leg, value * Split<T>.All(ref TwiddleRe, ref TwiddleIm, Twiddle + (leg - 1) * TwiddleStep));
}

/// <summary>A short discrete Fourier transform, the step that longer ones are made of.</summary>
internal interface IButterfly
{
    static abstract int Radix { get; }

    static abstract void Apply<T>(ref Legs legs) where T : struct, ILanes<T>;
}

internal readonly struct Radix2 : IButterfly
{
    public static int Radix => 2;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Apply<T>(ref Legs legs) where T : struct, ILanes<T>
    {
        Split<T> a = legs.Take<T>(0), b = legs.Take<T>(1);
        legs.Put(0, a + b);
        legs.Turn(1, a - b);
    }
}

internal readonly struct Radix3 : IButterfly
{
    private const double HalfRootOf3 = 0.86602540378443864676;

    public static int Radix => 3;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Apply<T>(ref Legs legs) where T : struct, ILanes<T>
    {
        Split<T> a = legs.Take<T>(0), b = legs.Take<T>(1), c = legs.Take<T>(2);
        Split<T> sum = b + c, middle = a - sum * 0.5, turned = ((b - c) * HalfRootOf3).TurnedBack;
        legs.Put(0, a + sum);
        legs.Turn(1, middle + turned);
        legs.Turn(2, middle - turned);
    }
}

internal readonly struct Radix4 : IButterfly
{
    public static int Radix => 4;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Apply<T>(ref Legs legs) where T : struct, ILanes<T>
    {
        Split<T> a = legs.Take<T>(0), b = legs.Take<T>(1), c = legs.Take<T>(2), d = legs.Take<T>(3);
        Split<T> even = a + c, evenDifference = a - c, odd = b + d, oddTurned = (b - d).TurnedBack;
        legs.Put(0, even + odd);
        legs.Turn(1, evenDifference + oddTurned);
        legs.Turn(2, even - odd);
        legs.Turn(3, evenDifference - oddTurned);
    }
}

internal readonly struct Radix5 : IButterfly
{
    // Cosine and sine of a fifth and of two fifths of a turn.
    private const double C1 = 0.30901699437494742410, C2 = -0.80901699437494742410, S1 = 0.95105651629515357212, S2 = 0.58778525229247312917;

    public static int Radix => 5;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Apply<T>(ref Legs legs) where T : struct, ILanes<T>
    {
        Split<T> a = legs.Take<T>(0), b = legs.Take<T>(1), c = legs.Take<T>(2), d = legs.Take<T>(3), e = legs.Take<T>(4);
        Split<T> outer = b + e, inner = c + d, outerDifference = b - e, innerDifference = c - d;
        Split<T> first = a + outer * C1 + inner * C2, second = a + outer * C2 + inner * C1;
        Split<T> firstTurned = (outerDifference * S1 + innerDifference * S2).TurnedBack;
        Split<T> secondTurned = (outerDifference * S2 - innerDifference * S1).TurnedBack;
        legs.Put(0, a + outer + inner);
        legs.Turn(1, first + firstTurned);
        legs.Turn(2, second + secondTurned);
        legs.Turn(3, second - secondTurned);
        legs.Turn(4, first - firstTurned);
    }
}
