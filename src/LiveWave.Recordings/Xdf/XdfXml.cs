using System.Globalization;
using System.Text;
using System.Xml.Linq;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Writes the XML of headers and footers: no attributes, numbers with a point, no character that XML forbids.</summary>
internal static class XdfXml
{
    /// <summary>Of the file.</summary>
    public static byte[] FileHeader() => Bytes(new XElement("info", new XElement("version", "1.0")));

    /// <summary>Of a stream.</summary>
    public static byte[] StreamHeader(XdfStreamHead head) => Bytes(new XElement(
        "info",
        Text("name", head.Name),
        Text("type", head.Type),
        Text("channel_count", head.Channels.Count.ToString(CultureInfo.InvariantCulture)),
        Text("nominal_srate", Number(head.RateHz)),
        Text("channel_format", Word(head.Wire)),
        Text("source_id", head.SourceId),
        new XElement("desc", new XElement("channels", head.Channels.Select(channel => Channel(channel, head))), head.Notes)));

    /// <summary>Of the end of a stream.</summary>
    public static byte[] StreamFooter(double firstStamp, double lastStamp, long count, IEnumerable<(double Time, double Value)> offsets) => Bytes(new XElement(
        "info",
        Text("first_timestamp", Number(firstStamp)),
        Text("last_timestamp", Number(lastStamp)),
        Text("sample_count", count.ToString(CultureInfo.InvariantCulture)),
        new XElement("clock_offsets", offsets.Select(offset => new XElement("offset", Text("time", Number(offset.Time)), Text("value", Number(offset.Value)))))));

    private static XElement Channel(RecordedChannel channel, XdfStreamHead head)
    {
        var element = new XElement("channel", Text("label", channel.Label));
        if (channel.Unit.Length > 0) element.Add(Text("unit", channel.Unit));
        element.Add(Text("type", head.Type));
        if (double.IsFinite(channel.XMm) && double.IsFinite(channel.YMm))
        {
            element.Add(new XElement("location", Text("X", Number(channel.XMm)), Text("Y", Number(channel.YMm)), Text("Z", "0")));
        }

        if (channel.Conversion != 1) element.Add(Text("conversion", Number(channel.Conversion)));
        return element;
    }

    private static string Word(WireFormat? wire) => wire switch
    {
        null => "string",
        WireFormat.Int8 => "int8",
        WireFormat.Int16 => "int16",
        WireFormat.Int32 => "int32",
        WireFormat.Int64 => "int64",
        WireFormat.Float32 => "float32",
        WireFormat.Float64 => "double64",
        _ => throw new ArgumentException($"XDF has no format for {wire}", nameof(wire)),
    };

    private static XElement Text(string name, string text) =>
        new(name, string.Concat(text.Select(c => char.IsControl(c) || char.IsSurrogate(c) ? '?' : c)));

    private static string Number(double value) => value.ToString("R", CultureInfo.InvariantCulture);

    private static byte[] Bytes(XElement root) =>
        Encoding.UTF8.GetBytes("<?xml version=\"1.0\"?>\n" + root.ToString(SaveOptions.None).ReplaceLineEndings("\n") + "\n");
}
