using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Commands.Tables;

namespace ScopeReader.Commands.Archive;

/// <summary>Adds measured files to an archive a batch at a time, and says so once each is on the disk.</summary>
internal sealed class Keeper(string path, Func<KeptFile, NewEntry> describe, TextWriter says) : IDisposable
{
    private const int BatchSize = 25;

    private readonly List<NewEntry> _waiting = [];
    private MeasurementArchive? _archive;

    /// <summary>Adds a file, now or with the next ones.</summary>
    /// <exception cref="ArchiveException">The batch was not written.</exception>
    public void Keep(KeptFile file)
    {
        _waiting.Add(describe(file));
        if (_waiting.Count == BatchSize)
            Flush();
    }

    /// <summary>Writes what waits.</summary>
    /// <exception cref="ArchiveException">It was not written.</exception>
    public void Flush()
    {
        if (_waiting.Count == 0)
            return;
        _archive ??= MeasurementArchive.Open(path);
        IReadOnlyList<Added> added = _archive.Add(_waiting);
        for (int i = 0; i < added.Count; i++)
            says.WriteLine(SafeText.Of(Words(_waiting[i].File, added[i])));
        _waiting.Clear();
    }

    private static string Words(string file, Added added)
    {
        string entry = added.Entry.ToString(CultureInfo.InvariantCulture);
        return added.IsNew ? $"{file}: kept as entry {entry}" : $"{file}: is entry {entry} already, added {ArchiveCommand.Minute(added.AddedAt)}; --again adds it once more";
    }

    public void Dispose() => _archive?.Dispose();
}
