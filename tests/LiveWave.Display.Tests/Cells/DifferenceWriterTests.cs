using System.Text;
using FsCheck.Xunit;

namespace LiveWave.Display.Tests;

public sealed class DifferenceWriterTests
{
    private const int Columns = 17;
    private const int Rows = 5;

    [Property(Replay = "2026,1201")]
    public bool Told_the_differences_a_screen_shows_each_picture(int seed, byte depth)
    {
        var colours = (ColourDepth)(depth % 4);
        var random = new Random(seed);
        var writer = new DifferenceWriter(colours);
        var screen = new VirtualScreen(Columns, Rows);
        var picture = new CellGrid(Columns, Rows);

        for (var frame = 0; frame < 6; frame++)
        {
            Scribble(picture, random);
            screen.Write(writer.Difference(picture).ToString());
            if (!Shows(screen, picture, colours)) return false;
        }

        return true;
    }

    [Fact]
    public void A_picture_that_is_shown_already_needs_no_word()
    {
        var writer = new DifferenceWriter(ColourDepth.Full);
        var picture = new CellGrid(Columns, Rows);
        Scribble(picture, new Random(1));

        var first = writer.Difference(picture).Length;
        var second = writer.Difference(picture).Length;

        Assert.True(first > Columns * Rows);
        Assert.Equal(0, second);
    }

    [Fact]
    public void One_changed_cell_costs_one_move_one_look_and_one_glyph()
    {
        var writer = new DifferenceWriter(ColourDepth.None);
        var picture = new CellGrid(Columns, Rows);
        _ = writer.Difference(picture);

        picture.Put(4, 2, 'x', Slate.Text);

        Assert.Equal("\e[3;5H\e[0mx\e[0m", writer.Difference(picture).ToString());
    }

    [Fact]
    public void After_a_repeat_all_is_told_again_and_nothing_wiped()
    {
        var writer = new DifferenceWriter(ColourDepth.None);
        var picture = new CellGrid(3, 1);
        picture.Write(0, 0, 3, "abc", Slate.Text);
        _ = writer.Difference(picture);

        writer.Repeat();

        Assert.Equal("\e[1;1H\e[0mabc\e[0m", writer.Difference(picture).ToString());
    }

    [Fact]
    public void Another_size_wipes_and_tells_all()
    {
        var writer = new DifferenceWriter(ColourDepth.None);
        _ = writer.Difference(new CellGrid(Columns, Rows));
        var smaller = new CellGrid(2, 1);
        smaller.Write(0, 0, 2, "ab", Slate.Text);

        Assert.Equal("\e[0m\e[2J\e[1;1H\e[0mab\e[0m", writer.Difference(smaller).ToString());
    }

    private static void Scribble(CellGrid picture, Random random)
    {
        for (var i = random.Next(1 + (Columns * Rows)); i > 0; i--)
        {
            var cell = new Cell((char)random.Next('a', 'f'), Any(random), Any(random), (CellStyle)random.Next(4));
            picture.Put(random.Next(Columns), random.Next(Rows), cell);
        }
    }

    private static Colour Any(Random random) =>
        random.Next(3) == 0 ? Slate.Text : CyclicMap.AtDegrees(random.Next(3) * 90);

    private static bool Shows(VirtualScreen screen, CellGrid picture, ColourDepth depth)
    {
        for (var y = 0; y < Rows; y++)
        {
            for (var x = 0; x < Columns; x++)
            {
                if (screen[x, y] != (picture[x, y].Glyph, Look(picture[x, y], depth))) return false;
            }
        }

        return true;
    }

    private static string Look(Cell cell, ColourDepth depth)
    {
        var look = new StringBuilder("0");
        if (cell.Style.HasFlag(CellStyle.Bold)) look.Append(";1");
        if (cell.Style.HasFlag(CellStyle.Reversed)) look.Append(";7");
        ColourCode.Append(look, cell.Ink, isGround: false, depth);
        ColourCode.Append(look, cell.Ground, isGround: true, depth);
        return look.ToString();
    }
}
