namespace ScopeReader.Bench.Pages;

/// <summary>Something a person can do on a page: one entry serves its keys, the line of keys and the help.</summary>
/// <param name="Shown">Its keys as written: "+ −".</param>
/// <param name="Name">What it does in a word, for the line of keys; empty keeps it off the line.</param>
/// <param name="Explains">What it does in a sentence without a full stop.</param>
/// <param name="Presses">The key presses, each with what it does.</param>
internal sealed record PageAction(string Shown, string Name, string Explains, params (KeyPress Key, Action Do)[] Presses);
