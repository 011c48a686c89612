using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Serialization;
using ScopeReader.Archive.Search;

namespace ScopeReader.Archive;

/// <summary>Entries and findings as JSON for programs, version 1.</summary>
public static class ArchiveDocuments
{
    private static readonly DocumentContext Context = new(new JsonSerializerOptions(DocumentContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    /// <summary>What a search found.</summary>
    public static string Of(Found found)
    {
        ArgumentNullException.ThrowIfNull(found);
        return JsonSerializer.Serialize(new FindDocument("scopereader-archive-find", 1, found.Matches, found.Entries), Context.FindDocument);
    }

    /// <summary>An entry with its history.</summary>
    public static string Of(Entry entry) => JsonSerializer.Serialize(entry, Context.Entry);

    /// <summary>What an archive holds.</summary>
    public static string Of(ArchiveStats stats) => JsonSerializer.Serialize(stats, Context.ArchiveStats);

    /// <summary>What checking an archive found.</summary>
    public static string Of(Verification verification) => JsonSerializer.Serialize(verification, Context.Verification);
}

internal sealed record FindDocument(string Format, int Version, long Matches, IReadOnlyList<FoundEntry> Entries);

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, WriteIndented = true, NewLine = "\n", UseStringEnumConverter = true,
    NumberHandling = JsonNumberHandling.AllowNamedFloatingPointLiterals)]
[JsonSerializable(typeof(FindDocument))]
[JsonSerializable(typeof(Entry))]
[JsonSerializable(typeof(ArchiveStats))]
[JsonSerializable(typeof(Verification))]
[JsonSerializable(typeof(SortedDictionary<string, Condition>))]
[JsonSerializable(typeof(SortedDictionary<string, long>))]
internal sealed partial class DocumentContext : JsonSerializerContext;
