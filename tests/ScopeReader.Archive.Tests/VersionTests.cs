using ScopeReader.Archive;

namespace ScopeReader.Tests.Archive;

public sealed class VersionTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Theory]
    // Written by the program of that schema: three entries of "archive trials make"; the head that it printed then.
    [InlineData("version-1.db", "3d041fbf08e383d99fa714fa7b652f735a2bf0804c2289836e3aa7cdf2934bab")]
    public void An_archive_of_every_version_opens_verifies_and_takes_entries(string name, string head)
    {
        File.Copy(Path.Combine(AppContext.BaseDirectory, "Archives", name), _fixture.File);

        using MeasurementArchive archive = _fixture.Open();

        Assert.Equal(head, archive.Head);
        Assert.True(archive.Verify(head).IsSound);
        Assert.Equal(Fixture.Entry(1).Details.Serial, archive.Show(2).Details.Serial);
        Assert.Equal(4, archive.Add(Fixture.Entry(99)).Entry);
        Assert.True(archive.Verify(head).IsSound);
    }
}
