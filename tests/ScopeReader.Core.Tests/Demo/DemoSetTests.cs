using ScopeReader.DemoCaptures;

namespace ScopeReader.Tests.Demo;

/// <summary>The committed captures are those that their maker makes.</summary>
public class DemoSetTests
{
    private static readonly string Folder = Path.Combine(Top(), "captures-demo");

    public static TheoryData<string> Names => [.. DemoSet.All.Select(f => f.Name)];

    [Theory]
    [MemberData(nameof(Names))]
    public void Maker_reproduces_the_committed_capture_byte_for_byte(string name)
    {
        byte[] made = DemoSet.All.Single(f => f.Name == name).Make(), kept = File.ReadAllBytes(Path.Combine(Folder, name));
        Assert.True(made.AsSpan().SequenceEqual(kept), $"{name} differs from byte {made.AsSpan().CommonPrefixLength(kept)} on");
    }

    [Fact]
    public void Every_committed_capture_is_made()
    {
        string[] kept = [.. Directory.GetFiles(Folder, "*.csv").Select(f => Path.GetFileName(f)!).Order(StringComparer.Ordinal)];
        Assert.Equal(DemoSet.All.Select(f => f.Name).Order(StringComparer.Ordinal), kept);
    }

    [Fact]
    public void Captures_stay_small() =>
        // The project's own rule: each under 2 MB, so that a clone stays light.
        Assert.All(DemoSet.All, f => Assert.InRange(new FileInfo(Path.Combine(Folder, f.Name)).Length, 1, 2_000_000));

    private static string Top()
    {
        DirectoryInfo? here = new(AppContext.BaseDirectory);
        while (here is not null && !File.Exists(Path.Combine(here.FullName, "ScopeReader.sln")))
            here = here.Parent;
        return here?.FullName ?? throw new DirectoryNotFoundException("no ScopeReader.sln above the tests");
    }
}
