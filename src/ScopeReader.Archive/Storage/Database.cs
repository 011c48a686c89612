using System.Globalization;
using Microsoft.Data.Sqlite;

namespace ScopeReader.Archive.Storage;

/// <summary>A connection with its prepared statements. Values reach SQL as parameters only.</summary>
internal sealed class Database : IDisposable
{
    // More than the fixed statements of this program.
    private const int MostPrepared = 100;

    private readonly Dictionary<string, SqliteCommand> _prepared = new(StringComparer.Ordinal);

    public Database(string connectionString)
    {
        Connection = new SqliteConnection(connectionString);
        Connection.Open();
    }

    public SqliteConnection Connection { get; }

    /// <summary>Runs a statement.</summary>
    /// <param name="sql">A text of this program's own; its parameters are @1, @2, ….</param>
    /// <param name="values">The parameters' values in order; null for NULL.</param>
    /// <returns>Rows changed.</returns>
    public int Run(string sql, params ReadOnlySpan<object?> values) => Prepare(sql, values).ExecuteNonQuery();

    /// <summary>The rows of a query; dispose them before the same query runs again.</summary>
    public SqliteDataReader Rows(string sql, params ReadOnlySpan<object?> values) => Prepare(sql, values).ExecuteReader();

    /// <summary>The rows of a query that is put together anew each time, and so not kept prepared.</summary>
    public SqliteDataReader RowsOnce(string sql, params ReadOnlySpan<object?> values)
    {
        SqliteDataReader rows = Prepare(sql, values).ExecuteReader();
        if (_prepared.Count > MostPrepared)
            _prepared.Remove(sql);
        return rows;
    }

    /// <summary>The first column of the first row of such a query.</summary>
    public long NumberOnce(string sql, params ReadOnlySpan<object?> values)
    {
        using SqliteDataReader rows = RowsOnce(sql, values);
        return rows.Read() && !rows.IsDBNull(0) ? rows.GetInt64(0) : 0;
    }

    /// <summary>The first column of the first row, or null.</summary>
    public object? Value(string sql, params ReadOnlySpan<object?> values) => Prepare(sql, values).ExecuteScalar() is { } value and not DBNull ? value : null;

    public long Number(string sql, params ReadOnlySpan<object?> values) => Value(sql, values) as long? ?? 0;

    /// <summary>Runs work that writes, all of it or none: no other writer can come between what it reads and what it writes.</summary>
    public T Write<T>(Func<T> work) => Within("BEGIN IMMEDIATE", work);

    /// <summary>Runs work that reads one unchanging state.</summary>
    public T Read<T>(Func<T> work) => Within("BEGIN", work);

    public void Dispose()
    {
        foreach (SqliteCommand command in _prepared.Values)
            command.Dispose();
        Connection.Dispose();
    }

    private SqliteCommand Prepare(string sql, ReadOnlySpan<object?> values)
    {
        if (!_prepared.TryGetValue(sql, out SqliteCommand? command))
        {
            command = Connection.CreateCommand();
#pragma warning disable CA2100 // Every caller passes a text of this program's own.
            command.CommandText = sql;
#pragma warning restore CA2100
            _prepared.Add(sql, command);
        }
        for (int i = command.Parameters.Count + 1; i <= values.Length; i++)
            command.Parameters.Add(new SqliteParameter { ParameterName = string.Create(CultureInfo.InvariantCulture, $"@{i}") });
        for (int i = 0; i < values.Length; i++)
            command.Parameters[i].Value = values[i] ?? DBNull.Value;
        return command;
    }

    private T Within<T>(string begin, Func<T> work)
    {
        Run(begin);
        try
        {
            T result = work();
            Run("COMMIT");
            return result;
        }
        catch
        {
            Abandon();
            throw;
        }
    }

    private void Abandon()
    {
        try
        {
            Run("ROLLBACK");
        }
        catch (SqliteException)
        {
            // After damage or on a full disk SQLite has rolled back by itself; the fault that led here says more.
        }
    }
}
