using System.Globalization;
using System.Text.Json;

namespace LiveWave.Dsp.Tests;

/// <summary>
/// Golden/portable.json: values at hard points (doubles nearest to multiples of a quarter turn, range ends, subnormals), exact to
/// the last bit, by mpmath at 1300 bits (tools/golden/portable_values.py).
/// </summary>
public class PortableGoldenTests
{
    [Fact]
    public void Hard_points_are_within_two_ulps_of_the_exact_value()
    {
        using var golden = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "portable.json")));

        foreach (var entry in golden.RootElement.GetProperty("cases").EnumerateArray())
        {
            var name = entry[0].GetString()!;
            var arguments = entry[1].EnumerateArray().Select(Value).ToArray();

            var distance = Ulps.Between(Value(entry[2]), Evaluate(name, arguments));

            Assert.True(distance <= 2, $"{name}({string.Join(", ", arguments)}) is {distance} ulps off");
        }
    }

    private static double Evaluate(string name, double[] arguments) => name switch
    {
        "sin" => Portable.Sin(arguments[0]),
        "cos" => Portable.Cos(arguments[0]),
        "tan" => Portable.Tan(arguments[0]),
        "exp" => Portable.Exp(arguments[0]),
        "log" => Portable.Log(arguments[0]),
        "atan2" => Portable.Atan2(arguments[0], arguments[1]),
        "hypot" => Portable.Hypot(arguments[0], arguments[1]),
        _ => throw new InvalidOperationException(name),
    };

    private static double Value(JsonElement bits) =>
        BitConverter.UInt64BitsToDouble(ulong.Parse(bits.GetString()!, NumberStyles.HexNumber, CultureInfo.InvariantCulture));
}
