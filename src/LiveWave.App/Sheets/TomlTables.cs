using LiveWave.Pipeline;
using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace LiveWave.App;

/// <summary>Turns TOML 1.1 text into tables that know their lines.</summary>
internal static class TomlTables
{
    /// <summary>Parses a text.</summary>
    /// <param name="text">TOML.</param>
    /// <param name="faults">The first breach of TOML, since what follows one says little; or else keys written twice. Empty where there
    /// are none.</param>
    /// <returns>The tables; to be used only where there are no faults.</returns>
    public static ParsedTable Parse(string text, out IReadOnlyList<SheetFault> faults)
    {
        var root = new ParsedTable(line: 1);
        if (Document(text, out faults) is { } document && faults.Count == 0) faults = new TomlTree(root).Fill(document);
        return root;
    }

    private static DocumentSyntax? Document(string text, out IReadOnlyList<SheetFault> faults)
    {
        try
        {
            var document = SyntaxParser.Parse(text, sourceName: null, validate: true);
            faults = [.. document.Diagnostics.Where(IsError).Select(FaultOf).OrderBy(fault => fault.Line).Take(1)];
            return document;
        }
        catch (TomlException e)
        {
            // Nesting beyond the parser's bound is thrown, not reported.
            faults = [new((e.Line ?? 0) + 1, "", "not valid TOML: " + OneLine(e.Message), "")];
        }
        catch (ArgumentOutOfRangeException)
        {
            // Tomlyn 2.10.2 fails on its own message where the file's last character is a backslash inside a text.
            faults = [new(text.Count(c => c == '\n') + 1, "", "not valid TOML: the file ends in the middle of a text", "")];
        }

        return null;
    }

    private static bool IsError(DiagnosticMessage message) => message.Kind == DiagnosticMessageKind.Error;

    private static SheetFault FaultOf(DiagnosticMessage message) =>
        new(Math.Max(0, message.Span.Start.Line) + 1, "", "not valid TOML: " + OneLine(message.Message), "");

    /// <summary>Messages quote the sheet, which may hold anything.</summary>
    private static string OneLine(string message) => string.Concat(message.Select(c => char.IsControl(c) ? ' ' : c)).Trim();
}
