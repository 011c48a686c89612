using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Serialization;

namespace ScopeReader.Archive.Contents;

/// <summary>How records are written as JSON: source-generated, camel case, nulls left out.</summary>
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, DefaultIgnoreCondition = JsonIgnoreCondition.WhenWritingNull,
    UseStringEnumConverter = true, NumberHandling = JsonNumberHandling.AllowNamedFloatingPointLiterals)]
[JsonSerializable(typeof(EntryContent))]
[JsonSerializable(typeof(AmendmentContent))]
[JsonSerializable(typeof(RemeasurementContent))]
[JsonSerializable(typeof(SortedDictionary<string, Condition>))]
internal sealed partial class ArchiveJson : JsonSerializerContext
{
    private static ArchiveJson? _readable;

    /// <summary>The one to use: letters outside ASCII stay readable.</summary>
    public static ArchiveJson Readable => _readable ??= new(new JsonSerializerOptions(Default.Options!) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });
}
