namespace LiveWave.Abstractions;

/// <summary>Number format of a sample as it came over the wire or lay in the file.</summary>
public enum WireFormat
{
    /// <summary>IEEE 754 single precision.</summary>
    Float32,

    /// <summary>IEEE 754 double precision.</summary>
    Float64,

    /// <summary>Signed 8-bit integer.</summary>
    Int8,

    /// <summary>Signed 16-bit integer.</summary>
    Int16,

    /// <summary>Signed 24-bit integer.</summary>
    Int24,

    /// <summary>Signed 32-bit integer.</summary>
    Int32,

    /// <summary>Signed 64-bit integer.</summary>
    Int64,
}
