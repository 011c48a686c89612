using System.Runtime.CompilerServices;

namespace ScopeReader.Numerics;

/// <summary>Complex numbers in lanes, real and imaginary parts apart.</summary>
internal readonly struct Split<T>(T re, T im) where T : struct, ILanes<T>
{
    private readonly T _re = re, _im = im;

    public T Re => _re;

    public T Im => _im;

    /// <summary>Times -i: a quarter turn back.</summary>
    public Split<T> TurnedBack
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => new(_im, T.All(0) - _re);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> Load(ref double re, ref double im, nint index) => new(T.Load(ref re, index), T.Load(ref im, index));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> All(ref double re, ref double im, nint index) => new(T.All(Unsafe.Add(ref re, index)), T.All(Unsafe.Add(ref im, index)));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Store(ref double re, ref double im, nint index)
    {
        _re.Store(ref re, index);
        _im.Store(ref im, index);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> operator +(Split<T> a, Split<T> b) => new(a._re + b._re, a._im + b._im);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> operator -(Split<T> a, Split<T> b) => new(a._re - b._re, a._im - b._im);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> operator *(Split<T> a, Split<T> b) => new(a._re * b._re - a._im * b._im, a._re * b._im + a._im * b._re);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Split<T> operator *(Split<T> a, double b) => new(a._re * T.All(b), a._im * T.All(b));
}
