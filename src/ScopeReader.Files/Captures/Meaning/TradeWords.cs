namespace ScopeReader.Files.Meaning;

/// <summary>The trade's words for axes, in English, German, French, Spanish, Italian, Portuguese, Polish, Chinese and Japanese.</summary>
internal static class TradeWords
{
    private static readonly string[] s_time = ["time", "zeit", "temps", "tiempo", "tempo", "czas", "时间", "時間", "时刻", "時刻"];
    private static readonly string[] s_frequency = ["frequency", "freq", "frequenz", "fréquence", "frecuencia", "frequenza", "frequência", "częstotliwość", "频率", "頻率", "周波数"];
    private static readonly string[] s_index =
        ["index", "n", "no", "no.", "nr", "nr.", "#", "point", "points", "sample", "samples", "count", "number", "sequence", "x", "row", "punkt", "punkte", "abtastwert", "muestra", "échantillon", "campione", "amostra", "próbka", "序号", "点", "番号"];

    /// <summary>True where a column's name says that it holds times.</summary>
    public static bool IsTime(string name) => name is "T" || HasLetter(name, 't') || Mentions(name, s_time);

    /// <summary>True where a column's name says that it holds frequencies.</summary>
    public static bool IsFrequency(string name) => name is "F" || HasLetter(name, 'f') || Mentions(name, s_frequency);

    /// <summary>True where a column's name says that it numbers the rows.</summary>
    public static bool IsIndex(string name) => s_index.Contains(name.Trim(), StringComparer.OrdinalIgnoreCase);

    /// <summary>True where a column's name is that of an axis.</summary>
    public static bool IsAxis(string name) => IsTime(name) || IsFrequency(name) || IsIndex(name);

    // The formula letter as a word of its own: "t", "A t", "t_2".
    private static bool HasLetter(string name, char letter)
    {
        for (int at = name.IndexOf(letter); at >= 0; at = name.IndexOf(letter, at + 1))
            if ((at == 0 || name[at - 1] is ' ' or '_') && (at == name.Length - 1 || name[at + 1] is ' ' or '_') && name.Length < 12)
                return true;
        return false;
    }

    // A word counts at the start or the end of a name ("Time 1", "rel. time"), but not inside another word ("sometimes").
    private static bool Mentions(string name, string[] words)
    {
        foreach (string word in words)
        {
            int at = name.IndexOf(word, StringComparison.OrdinalIgnoreCase);
            if (at < 0)
                continue;
            bool open = at == 0 || !char.IsLetter(name[at - 1]), closed = at + word.Length == name.Length || !char.IsLetter(name[at + word.Length]);
            if ((open && closed) || word[0] > '\u2E7F')
                return true;
        }
        return false;
    }
}
