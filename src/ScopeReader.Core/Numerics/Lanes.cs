using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ScopeReader.Numerics;

/// <summary>One or several doubles that are worked on together, so that a butterfly is written once.</summary>
internal interface ILanes<T> where T : struct, ILanes<T>
{
    static abstract int Count { get; }

    static abstract T Load(ref double source, nint index);

    static abstract T All(double value);

    void Store(ref double target, nint index);

    static abstract T operator +(T a, T b);

    static abstract T operator -(T a, T b);

    static abstract T operator *(T a, T b);
}

/// <summary>One double: for what is left over.</summary>
internal readonly struct One(double value) : ILanes<One>
{
    private readonly double _value = value;

    public static int Count => 1;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static One Load(ref double source, nint index) => new(Unsafe.Add(ref source, index));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static One All(double value) => new(value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Store(ref double target, nint index) => Unsafe.Add(ref target, index) = _value;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static One operator +(One a, One b) => new(a._value + b._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static One operator -(One a, One b) => new(a._value - b._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static One operator *(One a, One b) => new(a._value * b._value);
}

/// <summary>Four doubles in one register, where the processor has such.</summary>
internal readonly struct Four(Vector256<double> value) : ILanes<Four>
{
    public Vector256<double> Value { get; } = value;

    public static int Count => 4;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Four Load(ref double source, nint index) => new(Vector256.LoadUnsafe(ref Unsafe.Add(ref source, index)));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Four All(double value) => new(Vector256.Create(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Store(ref double target, nint index) => Value.StoreUnsafe(ref Unsafe.Add(ref target, index));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Four operator +(Four a, Four b) => new(a.Value + b.Value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Four operator -(Four a, Four b) => new(a.Value - b.Value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Four operator *(Four a, Four b) => new(a.Value * b.Value);
}
