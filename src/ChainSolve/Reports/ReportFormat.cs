namespace ChainSolve.Reports;

/// <summary>The forms in which results are written.</summary>
public enum ReportFormat
{
    /// <summary>For people: each value with the digits that its error bound earns.</summary>
    Text,

    /// <summary>For programs: one JSON document with all digits.</summary>
    Json,

    /// <summary>For tables: comma-separated values with all digits.</summary>
    Csv,
}
