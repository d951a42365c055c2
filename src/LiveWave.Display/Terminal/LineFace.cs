using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>Tells a session line by line, for files, pipes and dumb terminals: each wave, each verdict, each notice, and every ten
/// seconds how it stands.</summary>
internal sealed class LineFace : IFace
{
    private const double SecondsBetweenStands = 10;

    private readonly ITerminal _terminal;
    private readonly StringBuilder _lines = new();
    private bool _hasBegun;
    private long _waves;
    private long _verdicts;
    private Status? _notice;
    private double _nextStand = SecondsBetweenStands;

    public LineFace(ITerminal terminal) => _terminal = terminal;

    public void Show(SessionPicture picture)
    {
        _lines.Clear();
        if (!_hasBegun) Begin(picture);
        Waves(picture);
        Verdicts(picture);
        if (picture.Notice is { } notice && notice != _notice)
        {
            _notice = notice;
            Line($"! {notice.Where}: {notice.What}; {notice.Advice}");
        }

        var seconds = picture.NewestSeconds - picture.FirstSeconds;
        if (seconds >= _nextStand)
        {
            _nextStand = (Math.Floor(seconds / SecondsBetweenStands) + 1) * SecondsBetweenStands;
            Line($"{seconds,9:0.000} s  {picture.Run.Rows} rows judged, {picture.Run.LostRows} lost, {picture.Gate.PulsesUsed} pulses used; "
                + $"block 99 % {Words.Milliseconds(picture.Ledger.Blocks.PercentileMs(99))} ms");
        }

        if (_lines.Length > 0) _terminal.Write(_lines.ToString());
    }

    private void Begin(SessionPicture picture)
    {
        _hasBegun = true;
        var stream = picture.Facts.Stream;
        Line($"{StatePanel.Word(picture.Gate)}: {stream.Name}, {stream.ChannelCount} channels, {stream.NominalRateHz:0.##} Hz, {picture.Facts.CalibrationWord}");
    }

    private void Waves(SessionPicture picture)
    {
        var fresh = picture.Events.Added - _waves;
        _waves = picture.Events.Added;
        for (var back = (int)Math.Min(fresh, picture.Events.Count) - 1; back >= 0; back--)
        {
            ref readonly var wave = ref picture.Events[back];
            Line($"{wave.Passed.StampSeconds - picture.FirstSeconds,9:0.000} s  {WaveKinds.Word(wave.Kind)} wave {wave.Number} towards "
                + $"{Words.Degrees(wave.DirectionDegrees)} ± {wave.DirectionStandardErrorDegrees:0.0}°");
        }
    }

    private void Verdicts(SessionPicture picture)
    {
        var fresh = picture.Verdicts.Added - _verdicts;
        _verdicts = picture.Verdicts.Added;
        for (var back = (int)Math.Min(fresh, picture.Verdicts.Count) - 1; back >= 0; back--)
        {
            ref readonly var verdict = ref picture.Verdicts[back];
            Line($"{verdict.Decision.At.StampSeconds - picture.FirstSeconds,9:0.000} s  rule {verdict.Decision.Rule}, wave {verdict.Decision.EventNumber}: "
                + Words.Of(verdict, picture.Facts.Rules));
        }
    }

    private void Line(string text) => _lines.Append(text).Append('\n');
}
