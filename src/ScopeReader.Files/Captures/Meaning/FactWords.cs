namespace ScopeReader.Files.Meaning;

/// <summary>The trade's words for what a preamble says, in English, German, French, Spanish, Italian, Portuguese, Polish, Chinese and Japanese.</summary>
internal static class FactWords
{
    // Phrases that mean this wherever they stand in a key.
    private static readonly (string Phrase, Fact Fact)[] s_phrases =
    [
        ("resolution bandwidth", Fact.ResolutionBandwidth), ("res bw", Fact.ResolutionBandwidth), ("rbw", Fact.ResolutionBandwidth), ("auflösungsbandbreite", Fact.ResolutionBandwidth),
        ("bande de résolution", Fact.ResolutionBandwidth), ("bande passante de résolution", Fact.ResolutionBandwidth), ("ancho de banda de resolución", Fact.ResolutionBandwidth),
        ("banda di risoluzione", Fact.ResolutionBandwidth), ("banda de resolução", Fact.ResolutionBandwidth), ("pasmo rozdzielczości", Fact.ResolutionBandwidth), ("pasma rozdzielczości", Fact.ResolutionBandwidth),
        ("分辨率带宽", Fact.ResolutionBandwidth), ("分解能帯域幅", Fact.ResolutionBandwidth),
        ("sample rate", Fact.Rate), ("sampling rate", Fact.Rate), ("sample frequency", Fact.Rate), ("sampling frequency", Fact.Rate), ("abtastrate", Fact.Rate), ("abtastfrequenz", Fact.Rate),
        ("fréquence d'échantillonnage", Fact.Rate), ("taux d'échantillonnage", Fact.Rate), ("cadence d'échantillonnage", Fact.Rate), ("frecuencia de muestreo", Fact.Rate), ("tasa de muestreo", Fact.Rate),
        ("velocidad de muestreo", Fact.Rate), ("frequenza di campionamento", Fact.Rate), ("velocità di campionamento", Fact.Rate), ("frequência de amostragem", Fact.Rate), ("taxa de amostragem", Fact.Rate),
        ("częstotliwość próbkowania", Fact.Rate), ("采样率", Fact.Rate), ("采样频率", Fact.Rate), ("取样率", Fact.Rate), ("サンプリングレート", Fact.Rate), ("サンプリング周波数", Fact.Rate), ("サンプルレート", Fact.Rate), ("標本化周波数", Fact.Rate),
        ("sample interval", Fact.Interval), ("sampling interval", Fact.Interval), ("sample period", Fact.Interval), ("sampling period", Fact.Interval), ("sample time", Fact.Interval), ("time step", Fact.Interval),
        ("x increment", Fact.Interval), ("time increment", Fact.Interval), ("time per sample", Fact.Interval), ("abtastintervall", Fact.Interval), ("abtastperiode", Fact.Interval), ("abtastzeit", Fact.Interval),
        ("zeitschritt", Fact.Interval), ("zeitinkrement", Fact.Interval), ("intervalle d'échantillonnage", Fact.Interval), ("période d'échantillonnage", Fact.Interval), ("pas de temps", Fact.Interval),
        ("intervalo de muestreo", Fact.Interval), ("período de muestreo", Fact.Interval), ("periodo de muestreo", Fact.Interval), ("intervallo di campionamento", Fact.Interval), ("periodo di campionamento", Fact.Interval),
        ("intervalo de amostragem", Fact.Interval), ("período de amostragem", Fact.Interval), ("okres próbkowania", Fact.Interval), ("interwał próbkowania", Fact.Interval), ("odstęp próbkowania", Fact.Interval),
        ("采样间隔", Fact.Interval), ("采样周期", Fact.Interval), ("取样间隔", Fact.Interval), ("サンプリング間隔", Fact.Interval), ("サンプル間隔", Fact.Interval), ("サンプリング周期", Fact.Interval), ("時間間隔", Fact.Interval), ("时间间隔", Fact.Interval),
        ("record length", Fact.Points), ("number of points", Fact.Points), ("number of samples", Fact.Points), ("anzahl punkte", Fact.Points), ("punktzahl", Fact.Points), ("nombre de points", Fact.Points),
        ("número de puntos", Fact.Points), ("numero di punti", Fact.Points), ("número de pontos", Fact.Points), ("liczba punktów", Fact.Points), ("点数", Fact.Points), ("データ数", Fact.Points), ("ポイント数", Fact.Points),
        ("start frequency", Fact.Start), ("start time", Fact.Start), ("stop frequency", Fact.Stop), ("stop time", Fact.Stop), ("center frequency", Fact.Center), ("centre frequency", Fact.Center),
        ("startfrequenz", Fact.Start), ("startzeit", Fact.Start), ("stoppfrequenz", Fact.Stop), ("mittenfrequenz", Fact.Center), ("fréquence de début", Fact.Start), ("fréquence de départ", Fact.Start), ("fréquence de fin", Fact.Stop), ("fréquence centrale", Fact.Center),
        ("frecuencia inicial", Fact.Start), ("frecuencia final", Fact.Stop), ("frecuencia central", Fact.Center), ("frequenza iniziale", Fact.Start), ("frequenza finale", Fact.Stop), ("frequenza centrale", Fact.Center),
        ("frequência inicial", Fact.Start), ("frequência final", Fact.Stop), ("frequência central", Fact.Center), ("częstotliwość początkowa", Fact.Start), ("częstotliwość końcowa", Fact.Stop), ("częstotliwość środkowa", Fact.Center),
        ("起始频率", Fact.Start), ("终止频率", Fact.Stop), ("中心频率", Fact.Center), ("开始时间", Fact.Start), ("起始时间", Fact.Start), ("開始周波数", Fact.Start), ("終了周波数", Fact.Stop), ("停止周波数", Fact.Stop), ("中心周波数", Fact.Center), ("開始時間", Fact.Start), ("開始時刻", Fact.Start),
        ("vertical unit", Fact.ValueUnit), ("y unit", Fact.ValueUnit), ("horizontal unit", Fact.AxisUnit), ("x unit", Fact.AxisUnit), ("time unit", Fact.AxisUnit), ("zeiteinheit", Fact.AxisUnit),
        ("decimal mark", Fact.DecimalMark), ("decimal separator", Fact.DecimalMark), ("decimal sign", Fact.DecimalMark), ("dezimalzeichen", Fact.DecimalMark), ("dezimaltrennzeichen", Fact.DecimalMark), ("séparateur décimal", Fact.DecimalMark),
        ("separador decimal", Fact.DecimalMark), ("separatore decimale", Fact.DecimalMark), ("separator dziesiętny", Fact.DecimalMark), ("小数点", Fact.DecimalMark),
    ];

    // Words that mean this only when they are the whole key.
    private static readonly Dictionary<string, Fact> s_words = new(StringComparer.OrdinalIgnoreCase)
    {
        ["interval"] = Fact.Interval,
        ["step"] = Fact.Interval,
        ["x step"] = Fact.Interval,
        ["increment"] = Fact.Interval,
        ["xincrement"] = Fact.Interval,
        ["dt"] = Fact.Interval,
        ["dx"] = Fact.Interval,
        ["delta t"] = Fact.Interval,
        ["schrittweite"] = Fact.Interval,
        ["schritt"] = Fact.Interval,
        ["pas"] = Fact.Interval,
        ["intervalle"] = Fact.Interval,
        ["paso"] = Fact.Interval,
        ["intervalo"] = Fact.Interval,
        ["passo"] = Fact.Interval,
        ["intervallo"] = Fact.Interval,
        ["krok"] = Fact.Interval,
        ["步长"] = Fact.Interval,
        ["间隔"] = Fact.Interval,
        ["間隔"] = Fact.Interval,
        ["ステップ"] = Fact.Interval,
        ["rate"] = Fact.Rate,
        ["fs"] = Fact.Rate,
        ["start"] = Fact.Start,
        ["x start"] = Fact.Start,
        ["xstart"] = Fact.Start,
        ["x origin"] = Fact.Start,
        ["x zero"] = Fact.Start,
        ["t0"] = Fact.Start,
        ["x0"] = Fact.Start,
        ["first"] = Fact.Start,
        ["beginn"] = Fact.Start,
        ["début"] = Fact.Start,
        ["inicio"] = Fact.Start,
        ["inizio"] = Fact.Start,
        ["início"] = Fact.Start,
        ["początek"] = Fact.Start,
        ["起始"] = Fact.Start,
        ["开始"] = Fact.Start,
        ["開始"] = Fact.Start,
        ["stop"] = Fact.Stop,
        ["end"] = Fact.Stop,
        ["ende"] = Fact.Stop,
        ["stopp"] = Fact.Stop,
        ["fin"] = Fact.Stop,
        ["fine"] = Fact.Stop,
        ["fim"] = Fact.Stop,
        ["koniec"] = Fact.Stop,
        ["终止"] = Fact.Stop,
        ["结束"] = Fact.Stop,
        ["終了"] = Fact.Stop,
        ["center"] = Fact.Center,
        ["centre"] = Fact.Center,
        ["mitte"] = Fact.Center,
        ["centro"] = Fact.Center,
        ["środek"] = Fact.Center,
        ["中心"] = Fact.Center,
        ["span"] = Fact.Span,
        ["spanne"] = Fact.Span,
        ["excursion"] = Fact.Span,
        ["zakres"] = Fact.Span,
        ["扫宽"] = Fact.Span,
        ["スパン"] = Fact.Span,
        ["points"] = Fact.Points,
        ["samples"] = Fact.Points,
        ["punkte"] = Fact.Points,
        ["puntos"] = Fact.Points,
        ["punti"] = Fact.Points,
        ["pontos"] = Fact.Points,
        ["punkty"] = Fact.Points,
        ["unit"] = Fact.ValueUnit,
        ["units"] = Fact.ValueUnit,
        ["einheit"] = Fact.ValueUnit,
        ["unité"] = Fact.ValueUnit,
        ["unidad"] = Fact.ValueUnit,
        ["unità"] = Fact.ValueUnit,
        ["unidade"] = Fact.ValueUnit,
        ["jednostka"] = Fact.ValueUnit,
        ["单位"] = Fact.ValueUnit,
        ["単位"] = Fact.ValueUnit,
        ["channel"] = Fact.Channel,
        ["source"] = Fact.Channel,
        ["input"] = Fact.Channel,
        ["kanal"] = Fact.Channel,
        ["voie"] = Fact.Channel,
        ["canal"] = Fact.Channel,
        ["canale"] = Fact.Channel,
        ["kanał"] = Fact.Channel,
        ["通道"] = Fact.Channel,
        ["チャンネル"] = Fact.Channel,
        ["チャネル"] = Fact.Channel,
        ["decimal"] = Fact.DecimalMark,
    };

    /// <summary>What a key means; null where it means nothing that the reader needs.</summary>
    public static Fact? Of(string key)
    {
        key = key.Trim().Trim('#', '%', '!', '/', ':', '=', '"', '_', ' ').Replace('_', ' ').Replace('-', ' ').Trim();
        if (key.Length is 0 or > 60)
            return null;
        if (s_words.TryGetValue(key, out Fact fact))
            return fact;
        foreach ((string phrase, Fact meant) in s_phrases)
            if (key.Contains(phrase, StringComparison.OrdinalIgnoreCase))
                return meant;
        return null;
    }
}
