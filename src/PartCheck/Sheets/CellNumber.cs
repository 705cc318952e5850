using System.Globalization;
using System.Text.RegularExpressions;
using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>The value of one cell, or the sentence that says why there is none.</summary>
/// <param name="Si">The value in SI; null where it is blank or cannot be read.</param>
/// <param name="Wanted">What is wanted.</param>
/// <param name="Text">The sentence of the complaint; null where there is none.</param>
/// <param name="UnderWrongHeader">True for a bare number whose header names a unit of another kind: the header has been complained about.</param>
internal readonly partial record struct CellNumber(double? Si, string Wanted, string? Text, bool UnderWrongHeader = false)
{
    private const double DutyAtMost = 1;
    private const double ToleranceBelow = 0.05;

    /// <summary>Reads a cell by its column: unit in the cell, else in the header, else the column's own; then the plausible range.</summary>
    internal static CellNumber Read(SheetCell cell, TableColumn column, bool decimalComma)
    {
        QuantityKind kind = ColumnKindMap.QuantityOf(column.Spec.Kind)
            ?? throw new ArgumentException($"The column {column.Spec.Name} holds text.", nameof(column));
        string wanted = QuantityUnits.WantedOf(kind);
        if (cell.Number is null && cell.Text is "-" or "\u2013" or "\u2014")
        {
            return new CellNumber(null, wanted, null);
        }

        QuantityReading reading;
        if (cell.Number is { } stored)
        {
            if (OfNumber(cell, stored, kind, column, out reading) is { } trouble)
            {
                return new CellNumber(null, wanted, trouble);
            }
        }
        else
        {
            QuantityParser.TryParse(cell.Text, kind, decimalComma, column.Unit, out reading);
        }

        if (!reading.Ok)
        {
            bool comma = decimalComma && cell.Number is null;
            return new CellNumber(null, wanted, ComplaintTexts.Unreadable(reading.Trouble, column.Header, cell.Text, wanted, comma));
        }

        if (reading.BareNumber && column.UnitWrong)
        {
            return new CellNumber(null, wanted, null, UnderWrongHeader: true);
        }

        bool bare = reading.BareNumber && column.Unit is null;
        return bare && IsDoubtfulShare(column.Spec, reading.Si)
            ? new CellNumber(null, "a percentage with its % sign", ComplaintTexts.BareShare(column.Header, cell.Text))
            : InRange(cell, column, kind, reading.Si, bare);
    }

    private static CellNumber InRange(SheetCell cell, TableColumn column, QuantityKind kind, double si, bool bare)
    {
        ColumnSpec spec = column.Spec;
        string wanted = QuantityUnits.WantedOf(kind);
        if (si >= spec.Min && si <= spec.Max)
        {
            return new CellNumber(si, wanted, null);
        }

        string range = ComplaintTexts.Range(kind, spec.Min, spec.Max);
        bool unitMeant = bare && kind != QuantityKind.Number && (si > 0 || spec.Min <= 0 || kind == QuantityKind.Temperature);
        return new CellNumber(null, range, ComplaintTexts.Implausible(
            column.Header, cell.Text, EngineeringNotation.FormatAs(kind, si), range, unitMeant));
    }

    /// <summary>A bare Duty max up to 1 or a bare Tolerance below 0.05 may be meant as a share.</summary>
    private static bool IsDoubtfulShare(ColumnSpec spec, double si) =>
        spec.Kind == ColumnKind.Percent
        && ((spec.Name == "Duty max" && si * 100 <= DutyAtMost) || (spec.Name == "Tolerance" && si * 100 < ToleranceBelow));

    /// <summary>
    /// A number cell of a workbook. Its format may show a unit (<c>0.0 "mA"</c>): then the number stored has that unit, if the
    /// number shown is the one stored; if it shows the number scaled (4700 as <c>4.7k</c>), both must mean the same.
    /// </summary>
    /// <returns>A sentence where stored number and shown text do not agree; else null.</returns>
    private static string? OfNumber(SheetCell cell, double stored, QuantityKind kind, TableColumn column, out QuantityReading reading)
    {
        string digits = stored.ToString("R", CultureInfo.InvariantCulture);
        Match shown = ShownWithUnit().Match(cell.Text);
        if (cell.Percent)
        {
            bool share = kind == QuantityKind.Percent;
            reading = new QuantityReading(
                share ? QuantityTrouble.None : QuantityTrouble.WrongUnit, share ? stored : 0, false, QuantityUnits.WantedOf(kind));
            return null;
        }

        if (!shown.Success)
        {
            QuantityParser.TryParse(digits, kind, false, column.Unit, out reading);
            return null;
        }

        string number = shown.Groups["number"].Value.Replace(",", string.Empty, StringComparison.Ordinal);
        string unit = shown.Groups["unit"].Value;
        int point = number.IndexOf('.', StringComparison.Ordinal);
        int decimals = point < 0 ? 0 : number.Length - point - 1;
        double rounding = 0.5000001 * Math.Pow(10, -decimals);
        double.TryParse(number, NumberStyles.Float, CultureInfo.InvariantCulture, out double value);
        if (Math.Abs(value - stored) <= rounding)
        {
            QuantityParser.TryParse(digits + " " + unit, kind, false, column.Unit, out reading);
            return null;
        }

        QuantityParser.TryParse(digits, kind, false, column.Unit, out reading);
        bool agree = QuantityParser.TryParse(number + " " + unit, kind, false, null, out QuantityReading scaled)
            && reading.Ok && Math.Abs(scaled.Si - reading.Si) <= 0.05 * Math.Abs(reading.Si);
        return agree ? null : ComplaintTexts.ShownUnit(column.Header, cell.Text, digits);
    }

    [GeneratedRegex(@"^(?<number>[+-]?[0-9][0-9,]*(?:\.[0-9]+)?)\s*(?<unit>[A-Za-z\u00B0\u00B5\u03BC\u03A9\u2126][^0-9]*)$", RegexOptions.CultureInvariant)]
    private static partial Regex ShownWithUnit();
}
