using ScopeReader.Bench.Work;

namespace ScopeReader.Tests.Bench.Work;

public sealed class PathCompletionTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("completion-").FullName;

    public PathCompletionTests()
    {
        foreach (string name in new[] { "edge-1.csv", "edge-2.csv", "source.csv", ".hidden" })
            File.WriteAllText(Path.Combine(_folder, name), "");
        Directory.CreateDirectory(Path.Combine(_folder, "older"));
    }

    [Fact]
    public void One_fit_is_completed_and_several_as_far_as_they_agree()
    {
        Assert.Equal(Path.Combine(_folder, "source.csv"), Completed("so"));
        Assert.Equal(Path.Combine(_folder, "edge-"), Completed("e"));
        Assert.Equal(Path.Combine(_folder, "older/"), Completed("ol"));
        Assert.Equal(["edge-1.csv", "edge-2.csv"], PathCompletion.Of(Path.Combine(_folder, "edge")).Fits);
    }

    [Fact]
    public void Nothing_fits_in_a_folder_that_is_not_there() => Assert.Empty(PathCompletion.Of(Path.Combine(_folder, "no/such")).Fits);

    [Fact]
    public void Hidden_files_are_offered_only_when_asked_for()
    {
        Assert.DoesNotContain(".hidden", PathCompletion.Of(_folder + "/").Fits);
        Assert.Contains(".hidden", PathCompletion.Of(_folder + "/.h").Fits);
    }

    public void Dispose() => Directory.Delete(_folder, true);

    private string Completed(string start) => PathCompletion.Of(Path.Combine(_folder, start)).Path;
}
