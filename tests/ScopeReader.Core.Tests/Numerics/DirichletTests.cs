using ScopeReader.Numerics;

namespace ScopeReader.Tests.Numerics;

public class DirichletTests
{
    [Theory]
    [InlineData(0.0123, 1000)]
    [InlineData(0.0123, 1001)]
    [InlineData(0.4999, 500)]
    [InlineData(0.998, 777)]
    [InlineData(1.25, 64)]
    [InlineData(0.0005, 1000)]
    [InlineData(0, 10)]
    [InlineData(1, 10)]
    [InlineData(1, 11)]
    public void Closed_form_is_the_sum_itself(double frequency, int count)
    {
        double cosine = 0, timeSine = 0, squareCosine = 0;
        for (int i = 0; i < count; i++)
        {
            double t = i - (count - 1) / 2.0, x = 2 * Math.PI * frequency * t;
            cosine += Math.Cos(x);
            timeSine += t * Math.Sin(x);
            squareCosine += t * t * Math.Cos(x);
        }
        var found = Dirichlet.Of(frequency, count);
        // The sum's own terms are off by the rounding of x, up to 6000 rad here: 1e-12 of the largest term, N of them.
        Assert.Equal(cosine, found.Cosine, 1e-12 * count);
        Assert.Equal(timeSine, found.TimeSine, 1e-12 * count * count);
        Assert.Equal(squareCosine, found.SquareCosine, 1e-12 * Math.Pow(count, 3));
    }
}
