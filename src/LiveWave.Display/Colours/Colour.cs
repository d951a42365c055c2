namespace LiveWave.Display;

/// <summary>A colour as a screen may show it: 24 bits, and the name it goes by where a terminal has sixteen.</summary>
/// <param name="Red">sRGB, 0 to 255.</param>
/// <param name="Green">sRGB, 0 to 255.</param>
/// <param name="Blue">sRGB, 0 to 255.</param>
/// <param name="Basic">0 to 15 as terminals number them (8 to 15 are bright); <see cref="TerminalsOwn"/>: whatever it uses.</param>
internal readonly record struct Colour(byte Red, byte Green, byte Blue, byte Basic)
{
    /// <summary>No colour asked for: the terminal's own.</summary>
    public const byte TerminalsOwn = 16;

    /// <summary>A colour between two.</summary>
    /// <param name="from">At 0.</param>
    /// <param name="to">At 1; among sixteen it wins from a half on.</param>
    /// <param name="share">0 to 1.</param>
    public static Colour Mix(Colour from, Colour to, double share) => new(
        Mix(from.Red, to.Red, share), Mix(from.Green, to.Green, share), Mix(from.Blue, to.Blue, share), share < 0.5 ? from.Basic : to.Basic);

    private static byte Mix(byte from, byte to, double share) => (byte)Math.Round(from + ((to - from) * share));
}
