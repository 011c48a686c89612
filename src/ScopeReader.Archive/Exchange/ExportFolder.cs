using System.Globalization;

namespace ScopeReader.Archive.Exchange;

/// <summary>The names in an exported archive.</summary>
internal static class ExportFolder
{
    public const string Chain = "chain.csv", Entries = "entries.csv", Readings = "readings.csv", Explanation = "README.txt", Records = "records", Captures = "captures";

    public const string ChainHeader = "record,kind,entry,at,capture,content,hash";

    public const string ExplanationText =
        """
        This folder is a whole measurement archive, to be read without the program that wrote it.

        chain.csv     one row a record, in order: its number, kind, entry, time (UTC), the hash of the capture that it brought,
                      the hash of its content, and its own hash
        records/      the content of each record, JSON
        captures/     the captures' original bytes, named by their hash
        entries.csv   one row an entry as it stands, corrections included
        readings.csv  one row a reading of the latest measurement of each entry
        In the tables a text that could act as a formula has an apostrophe before it.

        Every hash is SHA-256, in hexadecimal. A record's own hash is that of eight lines, each ended by a line feed:
        "scopereader-archive-record 1", number, kind, entry, time, capture, content, and the hash of the record before (64 zeros
        before the first). The last hash stands for all the others: keep it elsewhere, and nobody can change anything here
        unseen. "archive import" makes an archive of this folder again, with the same last hash.

        """;

    public static string RecordFile(long number) => Path.Combine(Records, number.ToString("D8", CultureInfo.InvariantCulture) + ".json");

    /// <summary>The hash, and the ending of the file's name where it is a plain one.</summary>
    public static string CaptureFile(string sha256, string file)
    {
        string ending = Path.GetExtension(file);
        bool plain = ending.Length is > 1 and < 9 && ending.Skip(1).All(char.IsAsciiLetterOrDigit);
        return Path.Combine(Captures, sha256 + (plain ? ending : ""));
    }
}
