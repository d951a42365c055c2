using System.Globalization;

namespace LiveWave.Recordings;

/// <summary>One channel while its description is read. Of repeated elements the first counts.</summary>
internal sealed class XdfChannelDraft
{
    private string? _label;
    private string? _unit;
    private string? _conversion;
    private string? _x;
    private string? _y;

    /// <summary>Takes an element.</summary>
    /// <param name="path">Below the channel.</param>
    /// <param name="content">Its text.</param>
    public void Keep(string path, string content)
    {
        switch (path)
        {
            case "label":
                _label ??= content;
                break;
            case "unit":
                _unit ??= content;
                break;
            case "conversion":
                _conversion ??= content;
                break;
            case "location/X":
                _x ??= content;
                break;
            case "location/Y":
                _y ??= content;
                break;
        }
    }

    /// <summary>The channel.</summary>
    /// <param name="number">Its place, from 0.</param>
    /// <param name="flaw">What makes its samples useless; empty if nothing does.</param>
    public RecordedChannel Finish(int number, out string flaw)
    {
        flaw = "";
        var conversion = 1.0;
        if (!string.IsNullOrEmpty(_conversion))
        {
            conversion = Number(_conversion);
            if (double.IsNaN(conversion) || conversion == 0)
            {
                flaw = $"conversion '{PlainText.Of(_conversion)}' of channel {number + 1} is not a number other than 0";
            }
        }

        return new RecordedChannel(_label ?? "", _unit ?? "", conversion, Number(_x), Number(_y));
    }

    private static double Number(string? text) =>
        double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out var value) && double.IsFinite(value) ? value : double.NaN;
}
