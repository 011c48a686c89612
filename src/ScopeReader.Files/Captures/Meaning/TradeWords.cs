namespace ScopeReader.Files.Meaning;

/// <summary>The trade's words for axes, in English, German, French, Spanish, Italian, Portuguese, Polish, Chinese and Japanese.</summary>
internal static class TradeWords
{
    private static readonly string[] s_time = ["time", "zeit", "temps", "tiempo", "tempo", "czas", "时间", "時間", "时刻", "時刻"];
    private static readonly string[] s_frequency = ["frequency", "freq", "frequenz", "fréquence", "frecuencia", "frequenza", "frequência", "częstotliwość", "频率", "頻率", "周波数"];
    private static readonly string[] s_index =
        ["index", "n", "no", "no.", "nr", "nr.", "#", "point", "points", "sample", "samples", "count", "number", "x", "row", "punkt", "punkte", "abtastwert", "muestra", "échantillon", "campione", "amostra", "próbka", "序号", "点", "番号"];

    /// <summary>True where a column's name says that it holds times.</summary>
    public static bool IsTime(string name) => name is "t" or "T" || Mentions(name, s_time);

    /// <summary>True where a column's name says that it holds frequencies.</summary>
    public static bool IsFrequency(string name) => name is "f" or "F" || Mentions(name, s_frequency);

    /// <summary>True where a column's name says that it numbers the rows.</summary>
    public static bool IsIndex(string name) => s_index.Contains(name.Trim(), StringComparer.OrdinalIgnoreCase);

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
