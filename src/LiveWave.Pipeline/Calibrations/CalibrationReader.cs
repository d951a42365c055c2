using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Builds what was learnt from the entries of a calibration file, and refuses what can't have been learnt.</summary>
internal static class CalibrationReader
{
    // Relative to the largest variance: matrices are symmetric when written, and texts round both halves alike or by a last digit.
    private const double SymmetryTolerance = 1e-9;

    /// <summary>Reads one entry.</summary>
    /// <param name="node">The entry.</param>
    public static CalibrationEntry Entry(CalibrationNode node)
    {
        node.Knows(
            "patch", "band", "channels", "fingerprint", "unit", "phaseModel", "channelScale", "channelRms", "noise", "thresholds");
        var fingerprint = Fingerprint(node["fingerprint"]);
        var channels = PatchChannels(node, fingerprint);
        var phaseModel = node.Optional("phaseModel") is { } model ? PhaseModel(model) : null;
        var noise = node.Optional("noise") is { } covariance ? Noise(covariance, fingerprint.Channels.Count) : null;
        var scale = PerChannel(node, "channelScale", channels.Count, phaseModel is null ? "" : "the phase model is in its units");
        var rms = PerChannel(node, "channelRms", channels.Count, noise is null ? "" : "the noise is in its units");
        var calibration = new Calibration
        {
            Patch = node["patch"].Text(),
            Band = node["band"].Text(),
            PhaseModel = phaseModel,
            ChannelScale = scale,
            ChannelRms = rms,
            Noise = noise,
            Thresholds = Thresholds(node),
        };
        var frames = node.Optional("noise")?.Optional("frames")?.Whole(1) ?? 0;
        return new CalibrationEntry(calibration, fingerprint, node["unit"].Text(), channels, frames);
    }

    private static CalibrationFingerprint Fingerprint(CalibrationNode node)
    {
        node.Knows(
            "channels", "positionsMm", "rateHz", "lowHz", "highHz", "conditioning", "phaseEstimator", "waveEstimator", "samplesPerFrame", "event");
        var channels = Labels(node["channels"]);
        var rateHz = node["rateHz"].Positive();
        var lowHz = node["lowHz"].Positive();
        var highHz = node["highHz"].Positive();
        if (highHz <= lowHz) throw node["highHz"].Refusal("the band's upper edge is not above the lower one", "make the calibration again");
        if (highHz >= rateHz / 2) throw node["highHz"].Refusal("the band reaches half the rate", "make the calibration again");
        return new CalibrationFingerprint
        {
            Channels = channels,
            PositionsMm = Positions(node["positionsMm"], channels.Count),
            RateHz = rateHz,
            LowHz = lowHz,
            HighHz = highHz,
            Conditioning = [.. node["conditioning"].Items().Select(item => item.Text())],
            PhaseEstimator = node["phaseEstimator"].Text(),
            WaveEstimator = node["waveEstimator"].Text(),
            SamplesPerFrame = node["samplesPerFrame"].Whole(1),
            Event = Event(node["event"]),
        };
    }

    private static EventPrint Event(CalibrationNode node)
    {
        node.Knows("minimumMs", "stabilityMs", "stabilityDegrees", "gapMs", "refractoryMs");
        return new EventPrint(
            node["minimumMs"].Number(0), node["stabilityMs"].Number(0), node["stabilityDegrees"].Number(0, 180), node["gapMs"].Number(0),
            node["refractoryMs"].Number(0));
    }

    private static List<string> Labels(CalibrationNode node)
    {
        var labels = new List<string>();
        var seen = new HashSet<string>(StringComparer.Ordinal);
        foreach (var item in node.Items())
        {
            var label = item.Text();
            if (!seen.Add(label)) throw item.Refusal($"channel '{CalibrationNode.Plain(label)}' is there twice", "labels are unique");
            labels.Add(label);
        }

        return labels.Count > 0 ? labels : throw node.Refusal("there is no channel", "make the calibration again");
    }

    private static List<string> PatchChannels(CalibrationNode node, CalibrationFingerprint fingerprint)
    {
        if (node.Optional("channels") is not { } list) return [.. fingerprint.Channels];
        var channels = Labels(list);
        var next = 0;
        foreach (var good in fingerprint.Channels)
        {
            next = channels.IndexOf(good, next) + 1;
            if (next > 0) continue;
            throw list.Refusal(
                $"good channel '{CalibrationNode.Plain(good)}' is not among the patch's channels, in their order", "make the calibration again");
        }

        return channels;
    }

    private static (double XMm, double YMm)[] Positions(CalibrationNode node, int channels)
    {
        var items = node.Items();
        RequireLength(node, items.Length, channels, "positions");
        var positions = new (double XMm, double YMm)[channels];
        for (var i = 0; i < channels; i++)
        {
            var pair = items[i].Items();
            RequireLength(items[i], pair.Length, 2, "numbers");
            positions[i] = (pair[0].Number(), pair[1].Number());
        }

        return positions;
    }

    private static double[] PerChannel(CalibrationNode node, string key, int channels, string neededBecause)
    {
        if (node.Optional(key) is not { } list)
        {
            return neededBecause.Length == 0 ? [] : throw node.Refusal($"key '{key}' is missing", neededBecause);
        }

        var items = list.Items();
        RequireLength(list, items.Length, channels, "values");
        return [.. items.Select(item => item.Positive())];
    }

    private static PhaseModel PhaseModel(CalibrationNode node)
    {
        node.Knows("rateHz", "oscillators", "background", "whiteVariance");
        var oscillators = node["oscillators"].Items().Select(Oscillator).ToList();
        if (!oscillators.Any(oscillator => oscillator.IsTarget))
        {
            throw node["oscillators"].Refusal("none of the oscillators is the target", "at least one has isTarget true");
        }

        return new PhaseModel(
            node["rateHz"].Positive(), oscillators, [.. node["background"].Items().Select(Background)], node["whiteVariance"].Positive());
    }

    private static OscillatorTerm Oscillator(CalibrationNode node)
    {
        node.Knows("poleRe", "poleIm", "driveVariance", "isTarget");
        var re = node["poleRe"].Number();
        var im = node["poleIm"].Number();
        if ((re * re) + (im * im) >= 1) throw node.Refusal("the pole is not inside the unit circle", "the model would not be stable");
        return new OscillatorTerm(re, im, node["driveVariance"].Number(0), node["isTarget"].Flag());
    }

    private static BackgroundTerm Background(CalibrationNode node)
    {
        node.Knows("pole", "driveVariance");
        var pole = node["pole"].Number(0);
        if (pole >= 1) throw node["pole"].Refusal("the pole is not below 1", "the model would not be stable");
        return new BackgroundTerm(pole, node["driveVariance"].Number(0));
    }

    private static NoiseModel Noise(CalibrationNode node, int channels)
    {
        node.Knows("covariance", "loading", "model", "misfit", "frames");
        var covariance = Covariance(node["covariance"], channels);
        return new NoiseModel(
            covariance, node["loading"].Number(0), node["model"].Text(), node.Optional("misfit")?.Number(0) ?? double.NaN);
    }

    private static double[] Covariance(CalibrationNode node, int channels)
    {
        var rows = node.Items();
        RequireLength(node, rows.Length, channels, "rows");
        var matrix = new double[channels * channels];
        var largest = 0.0;
        for (var i = 0; i < channels; i++)
        {
            var row = rows[i].Items();
            RequireLength(rows[i], row.Length, channels, "values");
            for (var j = 0; j < channels; j++) matrix[(i * channels) + j] = i == j ? row[j].Positive() : row[j].Number();
            largest = Math.Max(largest, matrix[(i * channels) + i]);
        }

        for (var i = 0; i < channels; i++)
        {
            for (var j = 0; j < i; j++)
            {
                var across = matrix[(j * channels) + i];
                if (Math.Abs(matrix[(i * channels) + j] - across) <= SymmetryTolerance * largest) continue;
                throw rows[i].Items()[j].Refusal(
                    FormattableString.Invariant($"the covariance is not symmetric: {matrix[(i * channels) + j]} here, {across} across the diagonal"),
                    "make the calibration again");
            }
        }

        return matrix;
    }

    private static List<KindThreshold> Thresholds(CalibrationNode entry)
    {
        var thresholds = new List<KindThreshold>();
        foreach (var node in entry["thresholds"].Items())
        {
            var threshold = Threshold(node);
            if (thresholds.Any(one => one.Kind == threshold.Kind)) throw node["kind"].Refusal("this kind is there twice", "keep one of the two");
            thresholds.Add(threshold);
        }

        return thresholds;
    }

    private static KindThreshold Threshold(CalibrationNode node)
    {
        node.Knows("kind", "sectors", "enter", "falseEventsPerMinute");
        var word = node["kind"].Text();
        if (!WaveKinds.TryParse(word, out var kind))
        {
            throw node["kind"].Refusal($"'{CalibrationNode.Plain(word)}' is no kind of wave", "kinds are " + string.Join(", ", WaveKinds.All));
        }

        var enter = node["enter"].Items().Select(item => item.Number()).ToList();
        RequireLength(node["enter"], enter.Count, node["sectors"].Whole(1), "thresholds");
        if (node.Optional("falseEventsPerMinute") is not { } rates) return new KindThreshold(kind, enter, double.NaN, null, null);
        rates.Knows([.. RateKeys("surrogate"), .. RateKeys("baseline"), "nominal"]);
        var nominal = rates.Optional("nominal")?.Number(0) ?? double.NaN;
        return new KindThreshold(kind, enter, nominal, Rate(rates, "surrogate"), Rate(rates, "baseline"));
    }

    private static string[] RateKeys(string of) => [of, of + "Count", of + "Minutes", of + "Low", of + "High"];

    private static FalseEventRate? Rate(CalibrationNode rates, string of)
    {
        var keys = RateKeys(of);
        if (keys.All(key => rates.Optional(key) is null)) return null;
        var (perMinute, low, high) = (rates[keys[0]].Number(0), rates[keys[3]].Number(0), rates[keys[4]].Number(0));
        if (low > perMinute || high < perMinute)
        {
            throw rates[keys[0]].Refusal("the rate lies outside of its own interval", "make the calibration again");
        }

        return new FalseEventRate(perMinute, low, high, rates[keys[1]].Whole(0), rates[keys[2]].Positive());
    }

    private static void RequireLength(CalibrationNode node, int length, int expected, string what)
    {
        if (length == expected) return;
        throw node.Refusal($"{length} {what} where {expected} are expected", "the lists of an entry belong to the same channels: make the calibration again");
    }
}
