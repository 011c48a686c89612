namespace ScopeReader.Tests;

public class LayersTests
{
    [Fact]
    public void Core_knows_no_files_and_no_screen()
    {
        // House rule: what is measured rests on the framework and two libraries of mathematics alone.
        IEnumerable<string> strangers = typeof(Analysis).Assembly.GetReferencedAssemblies().Select(a => a.Name!)
            .Where(name => !name.StartsWith("System.", StringComparison.Ordinal) && name is not ("MathNet.Numerics" or "FftSharp"));

        Assert.Empty(strangers);
    }
}
