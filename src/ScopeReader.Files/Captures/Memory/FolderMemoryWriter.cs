using System.Text;
using ScopeReader.Files.Plans;

namespace ScopeReader.Files;

/// <summary>Remembers for a folder what a person says about a capture in it.</summary>
public static class FolderMemoryWriter
{
    private const string Head = "# How captures in this folder are read. Written by scopereader inspect --remember; change or remove it as you like.\n\n";

    /// <summary>Adds entries to a folder's memory; those it has already are changed in place, and comments stay.</summary>
    /// <param name="capture">A capture in the folder.</param>
    /// <param name="entries">What to remember.</param>
    /// <returns>The memory's file.</returns>
    /// <exception cref="PlanException">The memory that is there cannot be used or changed, or the folder cannot be written to.</exception>
    public static string Remember(string capture, IReadOnlyList<ImportEntry> entries)
    {
        ArgumentNullException.ThrowIfNull(capture);
        ArgumentNullException.ThrowIfNull(entries);
        string path = FolderMemory.PathFor(capture), unfinished = path + ".new";
        try
        {
            string text = With(FolderMemory.Text(path) ?? Head, entries, path);
            File.Delete(unfinished);
            using (var stream = new FileStream(unfinished, FileMode.CreateNew, FileAccess.Write))
                stream.Write(Encoding.UTF8.GetBytes(text));
            // In one step: a memory that is half written would spoil every capture of the folder.
            File.Move(unfinished, path, overwrite: true);
            return path;
        }
        catch (Exception e) when (e is UnauthorizedAccessException or IOException)
        {
            throw new PlanException(path, null, $"it could not be written: {e.Message}");
        }
    }

    /// <summary>A memory's text with entries added or changed.</summary>
    /// <exception cref="PlanException">The text is no memory, or is written in a way that cannot be added to.</exception>
    internal static string With(string text, IReadOnlyList<ImportEntry> entries, string path)
    {
        foreach (ImportEntry entry in entries)
            text = With(text, entry, path);
        ImportTable.Parse(text, path);
        return text;
    }

    private static string With(string text, ImportEntry entry, string path)
    {
        PlanSection? section = PlanDocument.Parse(text, path).Sections.LastOrDefault(s => s.Name == PlanKeyList.Import);
        if (section is null)
            return $"{Ended(text)}[import]\n{entry.Key} = {entry.Value}\n";
        foreach ((string key, PlanValue value) in section.Entries)
            if (key == entry.Key || IsSame(key, entry.Key))
            {
                string changed = text[..value.Start] + entry.Value + text[value.End..];
                // Interval and rate say the same thing: the key changes with the value.
                int at = changed.LastIndexOf(key, value.Start, StringComparison.Ordinal);
                return changed[..at] + entry.Key + changed[(at + key.Length)..];
            }
        // Right under the table's name, or under its last key and what stands behind that.
        int after = section.Entries.Count > 0 ? section.Entries[^1].Value.End : section.NameEnd;
        int end = text.IndexOf('\n', after);
        return end < 0 ? $"{text}\n{entry.Key} = {entry.Value}\n" : $"{text[..(end + 1)]}{entry.Key} = {entry.Value}\n{text[(end + 1)..]}";
    }

    private static bool IsSame(string key, string other) => (key, other) is ("interval", "rate") or ("rate", "interval");

    private static string Ended(string text) => text.Length == 0 || text[^1] == '\n' ? text : text + "\n";
}
