namespace LiveWave.Display;

/// <summary>The neutral colours. Hue belongs to phase and direction alone, so these have next to none.</summary>
internal static class Slate
{
    /// <summary>The ground everything stands on.</summary>
    public static Colour Ground { get; } = new(28, 33, 39, Colour.TerminalsOwn);

    /// <summary>Words and numbers.</summary>
    public static Colour Text { get; } = new(200, 207, 214, Colour.TerminalsOwn);

    /// <summary>Labels, axes, what is over.</summary>
    public static Colour Faint { get; } = new(124, 134, 144, 8);

    /// <summary>What the eye should find first.</summary>
    public static Colour Strong { get; } = new(248, 250, 252, 15);
}
