using System.Text;
using ScopeReader.Files.Plans;

namespace ScopeReader.Files;

/// <summary>What a person once said about the captures of a folder, kept in it as <c>.scopereader.toml</c>.</summary>
/// <remarks>It comes with the folder, from whoever made it: it can say how files are read and nothing else, it is below what a
/// plan or a command line says, and whenever it is used the capture's doubts say so.</remarks>
public static class FolderMemory
{
    /// <summary>Name of the file.</summary>
    public const string FileName = ".scopereader.toml";

    private const int Longest = 1 << 14;

    /// <summary>The file that holds the memory for a capture, whether it is there or not.</summary>
    /// <param name="capture">The capture's file.</param>
    public static string PathFor(string capture) => Path.Combine(Path.GetDirectoryName(capture) ?? "", FileName);

    /// <summary>What the capture's folder remembers.</summary>
    /// <param name="capture">The capture's file.</param>
    /// <exception cref="ImportException">There is a memory, and it cannot be used.</exception>
    public static ImportTable For(string capture)
    {
        ArgumentNullException.ThrowIfNull(capture);
        string path = PathFor(capture);
        try
        {
            return Text(path) is { } text ? ImportTable.Parse(text, path) : ImportTable.Empty;
        }
        catch (PlanException e)
        {
            throw Unusable(capture, e.Line, e.Problem, e);
        }
        catch (DecoderFallbackException e)
        {
            throw Unusable(capture, null, "expected UTF-8 text, found other bytes", e);
        }
        catch (Exception e) when (e is UnauthorizedAccessException or IOException)
        {
            throw Unusable(capture, null, $"it could not be read: {e.Message}", e);
        }
    }

    /// <summary>The text of a memory; null where there is none. Anything but a short file of its own is refused unread.</summary>
    /// <exception cref="PlanException">It is a link or too long.</exception>
    internal static string? Text(string path)
    {
        var file = new FileInfo(path);
        if (file.LinkTarget is not null)
            throw new PlanException(path, null, "expected a file of its own, found a link to another");
        // A device or a pipe has no length, and reading one might never end.
        if (!file.Exists || file.Length == 0)
            return null;
        return file.Length <= Longest ? File.ReadAllText(path, new UTF8Encoding(false, throwOnInvalidBytes: true))
            : throw new PlanException(path, null, $"expected at most {Longest >> 10} kB, found more");
    }

    private static ImportException Unusable(string capture, int? line, string problem, Exception cause) => new(capture,
        FormattableString.Invariant($"{FileName} in its folder{(line is { } l ? $", line {l}" : "")}: {Excerpt.Of(problem, 200).TrimEnd('.')}. Correct or remove that file."), cause: cause);
}
