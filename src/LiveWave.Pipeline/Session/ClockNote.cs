using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One line of <c>clock.tsv</c>: a clock measurement, or a block border from which blocks had another length.</summary>
/// <param name="IsBorder">A border; then only the row's number, the receive time and the rows count.</param>
/// <param name="Measurement">The measurement.</param>
/// <param name="BlockRows">Rows of this and the following blocks, until the next such line.</param>
public readonly record struct ClockNote(bool IsBorder, ClockMeasurement Measurement, int BlockRows);
