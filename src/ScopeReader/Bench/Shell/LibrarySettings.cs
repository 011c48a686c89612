using Terminal.Gui.App;
using Terminal.Gui.Configuration;
using Terminal.Gui.Drawing;
using Terminal.Gui.Drivers;
using Attribute = Terminal.Gui.Drawing.Attribute;

namespace ScopeReader.Bench.Shell;

/// <summary>Every setting of the terminal library that the bench depends on, set here.</summary>
/// <remarks>The library reads a person's own settings files before any code of ours runs; none of them may change the bench.</remarks>
internal static class LibrarySettings
{
    /// <summary>The driver that is used, whatever a settings file asks for.</summary>
    public static string Driver => DriverRegistry.Names.ANSI;

    /// <summary>Sets them all; before the library is started.</summary>
    public static void Apply()
    {
        Application.AppModel = AppModel.FullScreen;
        Application.ForceDriver = "";
        Application.MaximumIterationsPerSecond = 60;
        Application.DefaultKeyBindings?.Clear();
        Terminal.Gui.Drivers.Driver.Force16Colors = false;
        Terminal.Gui.Drivers.Driver.SizeDetection = SizeDetectionMode.Polling;
        var plain = new Scheme(new Attribute(Color.None, Color.None));
        foreach (string name in SchemeManager.GetSchemeNames().ToArray())
            SchemeManager.AddScheme(name, plain);
    }
}
