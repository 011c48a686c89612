namespace ScopeReader.Numerics;

/// <summary>Student's t, for intervals that rest on few observations.</summary>
public static class StudentT
{
    /// <summary>The factor k with P(|t| ≤ k) = 95 %.</summary>
    /// <param name="degreesOfFreedom">1 or more (fewer count as 1); infinity gives the normal 1.96.</param>
    /// <remarks>JCGM 100:2008, G.3 and table G.2. Fractional degrees of freedom are used as they are.</remarks>
    public static double Quantile95(double degreesOfFreedom) =>
        degreesOfFreedom > 1e6
            ? BoundedNormal.NormalQuantile(0.975)
            : MathNet.Numerics.Distributions.StudentT.InvCDF(0, 1, Math.Max(1, degreesOfFreedom), 0.975);
}
