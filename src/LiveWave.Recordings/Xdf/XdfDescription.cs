using System.Globalization;
using System.Text;
using System.Xml;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads the description of a stream: XML without document types, entities or resolver, bounded in size and depth. What is
/// wrong with it becomes <see cref="StreamDescription.Problem"/>, so that a file can still be listed.</summary>
internal sealed class XdfDescription
{
    /// <summary>Longest description that is read, bytes.</summary>
    public const int MostBytes = 16 << 20;

    /// <summary>Most channels of a stream. Of the order of the largest arrays made, and small enough that a lie costs little.</summary>
    public const int MostChannels = 1 << 16;

    private const int MostDepth = 64;
    private const int LongestText = 1024;
    private const string Channel = "info/desc/channels/channel";

    private readonly Dictionary<string, string> _first = new(StringComparer.Ordinal);
    private readonly List<XdfChannelDraft> _channels = [];
    private string _problem = "";

    private XdfDescription()
    {
    }

    /// <summary>Text of a header or footer: UTF-8, without a byte order mark in front, blanks or NUL around it; other
    /// control characters become question marks.</summary>
    /// <param name="bytes">As they lie in the file.</param>
    public static string Text(ReadOnlySpan<byte> bytes)
    {
        if (bytes.StartsWith((ReadOnlySpan<byte>)[0xEF, 0xBB, 0xBF])) bytes = bytes[3..];
        return Legal(Encoding.UTF8.GetString(bytes.Trim("\0 \t\r\n"u8)));
    }

    /// <summary>Reads a description.</summary>
    /// <param name="id">The stream's number.</param>
    /// <param name="text">The description.</param>
    public static StreamDescription Read(uint id, string text)
    {
        var description = new XdfDescription();
        try
        {
            description.Parse(text);
        }
        catch (XmlException error)
        {
            description.Fault("its description can't be read: " + PlainText.Of(error.Message));
        }

        return description.Stream(id);
    }

    /// <summary>A stream whose description is not even looked at.</summary>
    /// <param name="id">The stream's number.</param>
    /// <param name="problem">Why.</param>
    public static StreamDescription Unread(uint id, string problem) =>
        new(Key(id), "", "", 0, double.NaN, "", null, [], problem);

    // Control characters are illegal in XML, but occur in names; they must not cost the stream.
    private static string Legal(string text) => string.Create(text.Length, text, static (to, from) =>
    {
        for (var i = 0; i < to.Length; i++) to[i] = char.IsControl(from[i]) && from[i] is not ('\t' or '\r' or '\n') ? '?' : from[i];
    });

    private static string Key(uint id) => "#" + id.ToString(CultureInfo.InvariantCulture);

    private void Parse(string text)
    {
        var settings = new XmlReaderSettings
        {
            DtdProcessing = DtdProcessing.Prohibit,
            XmlResolver = null,
            MaxCharactersInDocument = MostBytes,
            MaxCharactersFromEntities = 1024,
            CheckCharacters = false,      // the same as character references
            IgnoreComments = true,
            IgnoreProcessingInstructions = true,
        };
        using var reader = XmlReader.Create(new StringReader(text), settings);
        var path = new List<string>();
        var content = new StringBuilder();
        do
        {
            Take(reader, path, content);
        }
        while (reader.Read() && !(path.Count == 1 && reader.NodeType == XmlNodeType.EndElement));
    }

    private void Take(XmlReader reader, List<string> path, StringBuilder content)
    {
        switch (reader.NodeType)
        {
            case XmlNodeType.Element:
                path.Add(reader.LocalName);
                if (path.Count > MostDepth) throw new XmlException($"elements are nested more than {MostDepth} deep");
                content.Clear();
                if (string.Join('/', path) == Channel && _channels.Count < MostChannels) _channels.Add(new XdfChannelDraft());
                if (reader.IsEmptyElement) path.RemoveAt(path.Count - 1);
                break;
            case XmlNodeType.Text or XmlNodeType.CDATA:
                if (content.Length < LongestText) content.Append(reader.Value);
                break;
            case XmlNodeType.EndElement:
                Keep(string.Join('/', path), content.ToString(0, Math.Min(content.Length, LongestText)).Trim());
                content.Clear();
                path.RemoveAt(path.Count - 1);
                break;
        }
    }

    private void Keep(string path, string content)
    {
        if (path.StartsWith(Channel + "/", StringComparison.Ordinal))
        {
            if (_channels.Count > 0) _channels[^1].Keep(path[(Channel.Length + 1)..], content);
        }
        else if (path is "info/name" or "info/type" or "info/channel_count" or "info/nominal_srate" or "info/channel_format")
        {
            _first.TryAdd(path["info/".Length..], content);
        }
    }

    private StreamDescription Stream(uint id)
    {
        var word = Of("channel_format");
        WireFormat? wire = word switch
        {
            "int8" => WireFormat.Int8,
            "int16" => WireFormat.Int16,
            "int32" => WireFormat.Int32,
            "int64" => WireFormat.Int64,
            "float32" => WireFormat.Float32,
            "double64" => WireFormat.Float64,
            _ => null,
        };
        if (wire is null && word != "string")
        {
            Fault($"channel_format '{PlainText.Of(word)}' is none of int8, int16, int32, int64, float32, double64, string");
        }

        var count = ChannelCount();
        var rate = NominalRate();
        var channels = new List<RecordedChannel>(Math.Min(count, _channels.Count));
        for (var i = 0; i < _channels.Count && i < count; i++)
        {
            channels.Add(_channels[i].Finish(i, out var flaw));
            if (flaw.Length > 0) Fault(flaw);
        }

        return new StreamDescription(Key(id), Of("name"), Of("type"), count, rate, word, wire, channels, _problem);
    }

    private int ChannelCount()
    {
        var text = Of("channel_count");
        if (!int.TryParse(text, NumberStyles.Integer, CultureInfo.InvariantCulture, out var count))
        {
            Fault($"channel_count '{PlainText.Of(text)}' is not a whole number");
            return 0;
        }

        if (count == 0) Fault("it declares zero channels");
        if (count < 0) Fault($"channel_count {count} is negative");
        if (count > MostChannels) Fault($"channel_count {count} is more than {MostChannels}, which is the most that is read");
        return count is < 0 or > MostChannels ? 0 : count;
    }

    private double NominalRate()
    {
        var text = Of("nominal_srate");
        if (!double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out var rate) || !double.IsFinite(rate))
        {
            Fault($"nominal_srate '{PlainText.Of(text)}' is not a number");
            return double.NaN;
        }

        if (rate < 0) Fault($"nominal_srate {text} is negative");
        return rate;
    }

    private string Of(string element) => _first.GetValueOrDefault(element, "");

    // The first fault is the one to tell: later ones may follow from it.
    private void Fault(string problem)
    {
        if (_problem.Length == 0) _problem = problem;
    }
}
