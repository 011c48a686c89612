using System.Globalization;
using System.Security.Cryptography;
using System.Text;

namespace ScopeReader.Archive.Storage;

/// <summary>A record's place in the ledger: everything that its hash covers.</summary>
/// <param name="Number">1, 2, 3, ….</param>
/// <param name="Kind">entry, amendment or measurement.</param>
/// <param name="Entry">The entry that it makes or concerns.</param>
/// <param name="At">UTC, as <see cref="Stamp"/> writes it.</param>
/// <param name="Capture">Hash of the capture's bytes, hexadecimal; empty where the record brings none.</param>
/// <param name="ContentSha256">Hash of the content's bytes, hexadecimal.</param>
internal sealed record LedgerRecord(long Number, string Kind, int Entry, string At, string Capture, string ContentSha256)
{
    public const string EntryKind = "entry", AmendmentKind = "amendment", MeasurementKind = "measurement";

    /// <summary>What the first record chains to.</summary>
    public static string NoHash { get; } = new('0', 64);

    /// <summary>The record's hash: SHA-256 of eight lines of text, so that anyone can check it with a pencil and a hash tool.</summary>
    /// <param name="previous">Hash of the record before, hexadecimal.</param>
    public string Hash(string previous) => Hex(SHA256.HashData(Encoding.UTF8.GetBytes(string.Create(CultureInfo.InvariantCulture,
        $"scopereader-archive-record 1\n{Number}\n{Kind}\n{Entry}\n{At}\n{Capture}\n{ContentSha256}\n{previous}\n"))));

    public static string Hex(ReadOnlySpan<byte> bytes) => Convert.ToHexStringLower(bytes);

    public static string HashOf(ReadOnlySpan<byte> content) => Hex(SHA256.HashData(content));

    public static string Stamp(DateTimeOffset at) => at.UtcDateTime.ToString("yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture);

    public static DateTimeOffset ParseStamp(string text) => DateTimeOffset.Parse(text, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal);
}
