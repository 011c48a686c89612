using System.Numerics;
using ScopeReader.Numerics;

namespace ScopeReader.Tests.Numerics;

public class MatrixPencilTests
{
    [Fact]
    public void Noise_free_values_give_their_poles_back()
    {
        // D39 and D40 (Hua and Sarkar 1990): y = 0.9^n cos(0.7 n), 40 values. Tolerance: the rows' own.
        double[] values = [.. Enumerable.Range(0, 40).Select(n => Math.Pow(0.9, n) * Math.Cos(0.7 * n))];
        Complex pole = MatrixPencil.Poles(values, 2).Single(z => z.Imaginary > 0);
        Assert.Equal(0.9, pole.Magnitude, 1e-10);
        Assert.Equal(0.7, pole.Phase, 1e-10);
        // D41 and D42: the recurrence y_n = c1 y_(n-1) + c2 y_(n-2) of those poles (Prony).
        Assert.Equal(1.37671593711208, 2 * pole.Real, 1e-10);
        Assert.Equal(-0.81, -pole.Magnitude * pole.Magnitude, 1e-10);
    }

    [Fact]
    public void A_level_is_a_pole_of_one()
    {
        double[] values = [.. Enumerable.Range(0, 60).Select(n => 3 + Math.Pow(0.95, n) * Math.Sin(1.1 * n) + 0.3 * Math.Pow(0.9, n) * Math.Cos(2 * n))];
        Complex[] poles = MatrixPencil.Poles(values, 5);
        // Exact without noise; the Hankel matrix keeps about nine digits of the weakest of five poles.
        Assert.Contains(poles, z => Complex.Abs(z - 1) < 1e-6);
        Assert.Contains(poles, z => Complex.Abs(z - Complex.FromPolarCoordinates(0.95, 1.1)) < 1e-6);
        Assert.Contains(poles, z => Complex.Abs(z - Complex.FromPolarCoordinates(0.9, 2)) < 1e-6);
    }
}
