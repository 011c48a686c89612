using Microsoft.Data.Sqlite;
using ScopeReader.Archive;
using ScopeReader.Archive.Search;

namespace ScopeReader.Tests.Archive.Search;

/// <summary>How SQLite goes about a search: along an index, and not through everything.</summary>
public sealed class PlanTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void A_subject_is_found_in_an_index_alone() =>
        Assert.Contains("SEARCH e USING COVERING INDEX entry_by_subject (subject=?)", Plan(new ArchiveQuery { Subject = "IF source, board 3" }));

    [Fact]
    public void A_quantitys_range_is_found_in_an_index_alone() =>
        Assert.Contains("SEARCH reading USING COVERING INDEX reading_by_value (quantity=? AND unit=? AND value>?)", Plan(new ArchiveQuery { Where = [Where("frequency-error > 99 ppm")] }));

    [Fact]
    public void What_fewest_meet_leads_and_the_rest_is_looked_up()
    {
        // One of 40 entries has the subject, half of them the reading.
        string[] plan = Plan(new ArchiveQuery { Subject = "IF source, board 3", Where = [Where("frequency-error > 0 ppm")] });
        Assert.Contains("SEARCH e USING COVERING INDEX entry_by_subject (subject=?)", plan);
        Assert.Contains("SEARCH reading EXISTS USING PRIMARY KEY (entry=? AND quantity=?)", plan);
    }

    [Fact]
    public void Only_a_pattern_that_may_begin_with_anything_goes_through_all_entries()
    {
        Assert.Contains("SCAN e USING COVERING INDEX entry_by_subject", Plan(new ArchiveQuery { Subject = "*board 3" }));
        Assert.DoesNotContain(Plan(new ArchiveQuery { Subject = "*board 3", Entries = [3] }), step => step.StartsWith("SCAN e", StringComparison.Ordinal));
    }

    private string[] Plan(ArchiveQuery query)
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add([.. Enumerable.Range(0, 40).Select(Fixture.Entry)]);
        var selection = new Selection(query);
        var steps = new List<string>();
        using SqliteDataReader row = archive.Database.Rows("EXPLAIN QUERY PLAN " + selection.Sql(archive.Database), selection.Values);
        while (row.Read())
            steps.Add(row.GetString(3));
        return [.. steps];
    }

    private static Comparison Where(string text) => Comparison.TryParse(text, out Comparison? comparison, out string problem) ? comparison! : throw new ArgumentException(problem);
}
