namespace ScopeReader.Bench.Work;

/// <summary>Completes a path that is being typed.</summary>
internal static class PathCompletion
{
    private const int Most = 1000;

    /// <summary>The longest common start of all that fits, and the names that fit.</summary>
    /// <param name="typed">What has been typed.</param>
    public static (string Path, IReadOnlyList<string> Fits) Of(string typed)
    {
        string folder = Path.GetDirectoryName(typed) is { Length: > 0 } above ? above : typed.StartsWith(Path.DirectorySeparatorChar) ? typed[..1] : "";
        string start = Path.GetFileName(typed);
        string[] fits;
        try
        {
            fits = [.. new DirectoryInfo(folder.Length == 0 ? "." : folder).EnumerateFileSystemInfos()
                .Where(i => i.Name.StartsWith(start, StringComparison.Ordinal) && (start.Length > 0 || !i.Name.StartsWith('.')))
                .Take(Most).Select(i => i is DirectoryInfo ? i.Name + Path.DirectorySeparatorChar : i.Name).Order(StringComparer.Ordinal)];
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException)
        {
            // A folder that is not there or not ours has nothing to offer.
            return (typed, []);
        }
        if (fits.Length == 0)
            return (typed, []);
        string common = fits[0];
        foreach (string fit in fits)
            while (!fit.StartsWith(common, StringComparison.Ordinal))
                common = common[..^1];
        return (Path.Combine(folder, common), fits);
    }
}
