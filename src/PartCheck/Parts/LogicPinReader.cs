using FluentValidation;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>Cells to logic pins.</summary>
public static class LogicPinReader
{
    private static readonly PinValidator Rules = new();

    /// <summary>Columns of the table.</summary>
    public static IReadOnlyList<ColumnSpec> Columns { get; } =
    [
        new("Name", ColumnKind.Text, Required: true),
        new("Output", ColumnKind.Text, Required: true),
        new("Supply min", ColumnKind.Voltage, 0.5, 20),
        new("Supply max", ColumnKind.Voltage, 0.5, 20),
        new("High min", ColumnKind.Voltage, 0.1, 20),
        new("High current", ColumnKind.Current, 1e-6, 0.2),
        new("High min 2", ColumnKind.Voltage, 0.1, 20),
        new("High current 2", ColumnKind.Current, 1e-6, 0.2),
        new("Low max", ColumnKind.Voltage, 0, 5),
        new("Low current", ColumnKind.Current, 1e-6, 0.2),
        new("Pin current max", ColumnKind.Current, 1e-6, 0.5),
        new("Source", ColumnKind.Text),
    ];

    /// <summary>Every pin of a sheet; a row with a complaint is left out.</summary>
    public static IReadOnlyList<LogicPin> Read(SheetData sheet, ColumnSpellings spellings, ComplaintList complaints)
    {
        Table? table = Table.Find(sheet, "Pins", Columns, spellings, complaints);
        List<LogicPin> pins = [];
        foreach (TableRow row in table?.Rows ?? [])
        {
            if (ReadRow(row) is not { } pin)
            {
                continue;
            }

            row.Check(Rules, pin);
            if (pins.Find(p => string.Equals(p.Name, pin.Name, StringComparison.OrdinalIgnoreCase)) is { } twin)
            {
                row.Complain("Name", "each pin once", $"The pin {pin.Name} stands in the table twice; the other row is {twin.Cell}.");
            }

            if (!row.HasComplaints)
            {
                pins.Add(pin);
            }
        }

        return pins;
    }

    private static LogicPin? ReadRow(TableRow row)
    {
        string? name = row.Text("Name");
        string? output = row.Text("Output");
        PinOutput? kind = output?.ToUpperInvariant() switch { "CMOS" => PinOutput.Cmos, "TTL" => PinOutput.Ttl, _ => null };
        if (name is null)
        {
            row.Complain("Name", "the pin's name", "The row names no pin.");
        }

        if (kind is null)
        {
            row.Complain("Output", "cmos or ttl", $"The output kind \"{output}\" is not known.");
        }

        double? Needed(string column)
        {
            if (row.Number(column) is { } number)
            {
                return number.Value;
            }

            if (row.Text(column) is null)
            {
                row.Complain(column, "a value", $"{column} of the pin is missing.");
            }

            return null;
        }

        double? supplyMin = Needed("Supply min");
        double? supplyMax = Needed("Supply max");
        double? highMin = Needed("High min");
        double? highCurrent = Needed("High current");
        double? second = row.Number("High min 2")?.Value;
        double? secondCurrent = row.Number("High current 2")?.Value;
        if ((second is null) != (secondCurrent is null) && !row.HasComplaints)
        {
            row.Complain(second is null ? "High min 2" : "High current 2", "both of the second pair", "The second high level needs both its voltage and its current.");
        }

        Voltage? lowMax = row.Value("Low max", Voltage.FromVolts);
        Current? lowCurrent = row.Value("Low current", Current.FromAmperes);
        Cited<Current>? rating = row.Quantity("Pin current max", Current.FromAmperes);
        if (name is null || kind is null || supplyMin is null || supplyMax is null || highMin is null || highCurrent is null || row.HasComplaints)
        {
            return null;
        }

        List<HighLevel> high = [new(Voltage.FromVolts(highMin.Value), Current.FromAmperes(highCurrent.Value))];
        if (second is not null && secondCurrent is not null)
        {
            high.Add(new HighLevel(Voltage.FromVolts(second.Value), Current.FromAmperes(secondCurrent.Value)));
        }

        return new LogicPin(
            name, kind.Value, new(Voltage.FromVolts(supplyMin.Value), Voltage.FromVolts(supplyMax.Value)), high,
            lowMax, lowCurrent, rating, row.Text("Source"), row.Cite("Name"));
    }

    private sealed class PinValidator : AbstractValidator<LogicPin>
    {
        public PinValidator()
        {
            this.Demand("Supply min", p => p.Supply.Min.Volts <= p.Supply.Max.Volts, "a voltage at most Supply max", _ => "Supply min is above Supply max.");
            this.Demand("High min", p => p.High[0].Min.Volts <= p.Supply.Max.Volts, "a level at most the supply", _ => "The high level is above the pin's supply.");
            this.Demand("High min 2", p => p.High.Skip(1).All(h => h.Min.Volts <= p.Supply.Max.Volts), "a level at most the supply", _ => "The second high level is above the pin's supply.");
            this.Demand("Low max", p => p.LowMax is not { } low || p.High.All(h => low.Volts < h.Min.Volts), "a level below High min", _ => "The low level is not below the high level.");
        }
    }
}
