namespace ScopeReader.Files.Plans;

/// <summary>The known word that a mistyped one most likely stands for.</summary>
public static class NearestWord
{
    // As many as fit a line.
    private const int FewWords = 10;

    /// <summary>The known word that the fewest slips turn into the typed one; the first of several; null without words.</summary>
    /// <param name="typed">What was typed. Case does not count.</param>
    /// <param name="known">The words to choose from.</param>
    public static string? Of(string typed, IEnumerable<string> known)
    {
        ArgumentNullException.ThrowIfNull(typed);
        ArgumentNullException.ThrowIfNull(known);
        return known.MinBy(word => Distance(typed, word));
    }

    /// <summary>What to tell the person: "the nearest is chain", or the few known words where none is near.</summary>
    /// <param name="typed">What was typed.</param>
    /// <param name="known">The known words, one or more.</param>
    public static string Hint(string typed, IReadOnlyList<string> known)
    {
        string nearest = Of(typed, known) ?? throw new ArgumentException("no words", nameof(known));
        bool alike = Distance(typed, nearest) < Math.Max(typed.Length, nearest.Length);
        return alike || known.Count > FewWords ? $"the nearest is {nearest}" : $"expected one of {string.Join(", ", known)}";
    }

    /// <summary>How many slips part two words: a letter too many, too few, wrong, or two swapped (optimal string alignment).</summary>
    public static int Distance(string typed, string word)
    {
        ArgumentNullException.ThrowIfNull(typed);
        ArgumentNullException.ThrowIfNull(word);
        // Nobody means a word by a page of text; the cost is the product of the lengths.
        ReadOnlySpan<char> a = typed.AsSpan(0, Math.Min(typed.Length, 64)), b = word.AsSpan(0, Math.Min(word.Length, 64));
        int[] before = new int[b.Length + 1], last = new int[b.Length + 1], now = new int[b.Length + 1];
        for (int j = 0; j <= b.Length; j++)
            last[j] = j;
        for (int i = 1; i <= a.Length; i++)
        {
            now[0] = i;
            for (int j = 1; j <= b.Length; j++)
            {
                int wrong = Same(a[i - 1], b[j - 1]) ? 0 : 1;
                now[j] = Math.Min(Math.Min(last[j], now[j - 1]) + 1, last[j - 1] + wrong);
                if (i > 1 && j > 1 && Same(a[i - 1], b[j - 2]) && Same(a[i - 2], b[j - 1]))
                    now[j] = Math.Min(now[j], before[j - 2] + 1);
            }
            (before, last, now) = (last, now, before);
        }
        return last[b.Length];
    }

    private static bool Same(char x, char y) => char.ToLowerInvariant(x) == char.ToLowerInvariant(y);
}
