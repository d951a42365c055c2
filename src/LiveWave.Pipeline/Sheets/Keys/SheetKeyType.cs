namespace LiveWave.Pipeline;

/// <summary>What a key of the sheet takes.</summary>
public enum SheetKeyType
{
    /// <summary>One table: <c>[name]</c> or <c>name = { ... }</c>.</summary>
    Table,

    /// <summary>Any number of tables: <c>[[name]]</c>.</summary>
    Tables,

    /// <summary>A name that also stands in files and on screens: short, printable, without the characters that file names forbid.</summary>
    Name,

    /// <summary>A text, or one of the key's words.</summary>
    Text,

    /// <summary>A list of texts, each different.</summary>
    Texts,

    /// <summary>A finite number, or one of the key's numbers.</summary>
    Number,

    /// <summary>A whole number.</summary>
    Whole,

    /// <summary>True or false.</summary>
    Flag,

    /// <summary>A table of names with a number each.</summary>
    NamedNumbers,

    /// <summary>A table of a plug-in's own keys: numbers, texts, true or false.</summary>
    Options,
}
