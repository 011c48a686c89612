using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Plans;

public class PlanEditorTests
{
    private static string Set(string text) => PlanEditor.SetInChain(text, "plan.toml", ("timebase-reads", "\"2 ppm\""), ("timebase-uncertainty", "\"0.1 ppm\""));

    // What each text becomes follows from TOML alone: the same keys, the new values, everything else untouched.
    [Theory]
    [InlineData("", "[chain]\ntimebase-reads = \"2 ppm\"\ntimebase-uncertainty = \"0.1 ppm\"\n")]
    [InlineData("subject = \"a\"", "subject = \"a\"\n\n[chain]\ntimebase-reads = \"2 ppm\"\ntimebase-uncertainty = \"0.1 ppm\"\n")]
    [InlineData("[chain]\nbits = 8", "[chain]\nbits = 8\ntimebase-reads = \"2 ppm\"\ntimebase-uncertainty = \"0.1 ppm\"\n")]
    [InlineData("[chain]\r\nbits = 8 # x\r\n", "[chain]\r\nbits = 8 # x\r\ntimebase-reads = \"2 ppm\"\r\ntimebase-uncertainty = \"0.1 ppm\"\r\n")]
    [InlineData("[levels]\nharmonics = 5\n", "[chain]\ntimebase-reads = \"2 ppm\"\ntimebase-uncertainty = \"0.1 ppm\"\n\n[levels]\nharmonics = 5\n")]
    [InlineData("[chain]\ntimebase-uncertainty='9 ppm' # old\ntimebase-reads   =   \"-1 ppm\"\n", "[chain]\ntimebase-uncertainty=\"0.1 ppm\" # old\ntimebase-reads   =   \"2 ppm\"\n")]
    public void Keys_are_set_in_place_or_added(string before, string after) => Assert.Equal(after, Set(before));

    [Fact]
    public void A_wrong_plan_is_refused_as_it_is() => Assert.Throws<PlanException>(() => Set("[chain]\nunknown = 1\n"));
}
