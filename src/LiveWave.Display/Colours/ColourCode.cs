using System.Globalization;
using System.Text;

namespace LiveWave.Display;

/// <summary>How a colour is asked for at each depth: parameters of the 'select graphic rendition' sequence (ECMA-48, ITU-T T.416).</summary>
internal static class ColourCode
{
    private const int CubeStart = 16;
    private const int GreyStart = 232;
    private static readonly int[] CubeLevels = [0, 95, 135, 175, 215, 255];

    /// <summary>Appends a semicolon and the parameters; nothing where there are no colours.</summary>
    /// <param name="to">The sequence so far.</param>
    /// <param name="colour">The colour.</param>
    /// <param name="isGround">Of the ground; false: of the ink.</param>
    /// <param name="depth">What the terminal shows.</param>
    public static void Append(StringBuilder to, Colour colour, bool isGround, ColourDepth depth)
    {
        var offset = isGround ? 10 : 0;
        if (depth == ColourDepth.Full)
        {
            to.Append(CultureInfo.InvariantCulture, $";{38 + offset};2;{colour.Red};{colour.Green};{colour.Blue}");
        }
        else if (depth == ColourDepth.TwoHundredFiftySix)
        {
            to.Append(CultureInfo.InvariantCulture, $";{38 + offset};5;{Of256(colour)}");
        }
        else if (depth == ColourDepth.Sixteen)
        {
            to.Append(CultureInfo.InvariantCulture, $";{Of16(colour.Basic) + offset}");
        }
    }

    /// <summary>The nearest of 256: by the cube, or by the greys where they are nearer.</summary>
    internal static int Of256(Colour colour)
    {
        var (r, g, b) = (NearestLevel(colour.Red), NearestLevel(colour.Green), NearestLevel(colour.Blue));
        var grey = Math.Clamp((int)Math.Round(((colour.Red + colour.Green + colour.Blue) / 3.0 - 8) / 10), 0, 23);
        var cubeDistance = Distance(colour, CubeLevels[r], CubeLevels[g], CubeLevels[b]);
        var greyLevel = 8 + (10 * grey);
        return Distance(colour, greyLevel, greyLevel, greyLevel) < cubeDistance ? GreyStart + grey : CubeStart + (36 * r) + (6 * g) + b;
    }

    private static int Of16(byte basic) => basic switch
    {
        Colour.TerminalsOwn => 39,
        < 8 => 30 + basic,
        _ => 82 + basic,   // 90 to 97
    };

    private static int NearestLevel(byte value)
    {
        var best = 0;
        for (var i = 1; i < CubeLevels.Length; i++)
        {
            if (Math.Abs(CubeLevels[i] - value) < Math.Abs(CubeLevels[best] - value)) best = i;
        }

        return best;
    }

    private static int Distance(Colour colour, int red, int green, int blue)
    {
        var (r, g, b) = (colour.Red - red, colour.Green - green, colour.Blue - blue);
        return (r * r) + (g * g) + (b * b);
    }
}
