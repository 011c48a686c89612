namespace ScopeReader.Bench.Pages;

/// <summary>What a page may ask of the bench that it is on.</summary>
internal interface IBenchHost
{
    /// <summary>Puts a page on top.</summary>
    void Show(Page page);

    /// <summary>Takes the top page away.</summary>
    void Back();

    /// <summary>Explains a page.</summary>
    void Help(Page page);

    /// <summary>Ends the program.</summary>
    void Quit();
}
