using System.Globalization;
using FluentValidation;
using PartCheck.Bills;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Channels;

/// <summary>Cells to channel rows. Every complaint about a row costs that channel alone.</summary>
public static class ChannelReader
{
    private static readonly ChannelValidator Rules = new();

    /// <summary>Every channel of a sheet, in order.</summary>
    /// <param name="sheet">The sheet.</param>
    /// <param name="bill">The bill, whose columns Channel and Role may stand in for the reference columns.</param>
    /// <param name="pins">Known pins, for the column Logic.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static IReadOnlyList<ChannelRow> Read(
        SheetData sheet, Bill? bill, IReadOnlyList<LogicPin> pins, ColumnSpellings spellings, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(sheet);
        ArgumentNullException.ThrowIfNull(complaints);
        Table? table = Table.Find(sheet, "Channels", ChannelColumns.All, spellings, complaints);
        if (table is null)
        {
            return [];
        }

        List<ChannelRow> rows = [];
        foreach (TableRow row in table.Rows)
        {
            string? name = row.Text("Channel");
            if (name is null)
            {
                row.Complain("Channel", "the channel's name", "The row has no channel name.");
                continue;
            }

            row.Channel = name;
            int at = rows.FindIndex(r => Same(r.Name, name));
            if (at >= 0)
            {
                ChannelRow twin = rows[at];
                rows[at] = twin with { Conditions = null };
                row.Complain("Channel", "each channel once", $"The channel {name} stands in the sheet twice; the other row is {twin.Cell}.");
                continue;
            }

            ChannelRow read = ReadRow(row, name, bill, pins);
            if (read.Pin is not null && rows.Find(r => Same(r.Pin, read.Pin) && r.Logic is not null && read.Logic is not null && !Same(r.Logic, read.Logic)) is { } other)
            {
                row.Complain("Logic", "one row of the pin table for one pin", $"The pin {read.Pin} is {read.Logic} here and {other.Logic} in channel {other.Name}.");
                read = read with { Conditions = null };
                rows[rows.IndexOf(other)] = other with { Conditions = null };
            }

            rows.Add(read);
        }

        if (rows.Count == 0)
        {
            complaints.Add(new Complaint(
                sheet.File, sheet.Sheet, null, null, null, null, "at least one channel", "The channels sheet has a header row and no channels.")
            { Fatal = true });
        }

        return rows;
    }

    private static ChannelRow ReadRow(TableRow row, string name, Bill? bill, IReadOnlyList<LogicPin> pins)
    {
        List<Assumption> assumed = [];
        Dictionary<Role, IReadOnlyList<string>> references = RoleReferences.Read(row, name, bill);
        string? logic = row.Text("Logic");
        if (logic is null)
        {
            row.Complain("Logic", "a row of the pin table", "The channel names no row of the pin table.");
        }
        else if (!pins.Any(p => string.Equals(p.Name, logic, StringComparison.OrdinalIgnoreCase)))
        {
            string known = pins.Count == 0 ? "the pin table is empty" : "known are " + string.Join(", ", pins.Select(p => p.Name));
            row.Complain("Logic", "a row of the pin table", $"The pin table has no row \"{logic}\": {known}.");
        }

        string? at = row.Text("Pull-down at");
        bool hasPullDown = references.GetValueOrDefault(Role.PullDown) is { Count: > 0 };
        if (at is not null && !Same(at, "base") && !Same(at, "pin"))
        {
            row.Complain("Pull-down at", "base or pin", $"\"{at}\" says neither that the pull-down sits at the base node nor at the pin.");
        }

        if (hasPullDown && at is null)
        {
            assumed.Add(new Assumption("Pull-down at", name, "base"));
        }

        ChannelConditions? conditions = Conditions(row, name, references.GetValueOrDefault(Role.Led)?.Count ?? 0, assumed);
        if (conditions is not null)
        {
            row.Check(Rules, conditions);
        }

        return new ChannelRow
        {
            Name = name,
            Cell = row.Cite("Channel"),
            Conditions = row.HasComplaints ? null : conditions,
            Logic = logic,
            Pin = row.Text("Pin"),
            References = references,
            PullDownAt = Same(at, "pin") ? PullDownAt.Pin : PullDownAt.Base,
            Assumed = assumed,
            Cells = ChannelColumns.All.ToDictionary(c => c.Name, c => row.Cite(c.Name), StringComparer.Ordinal),
        };
    }

    private static ChannelConditions? Conditions(TableRow row, string name, int named, List<Assumption> assumed)
    {
        double? Needed(string column)
        {
            if (row.Number(column) is { } number)
            {
                return number.Value;
            }

            if (row.Text(column) is null)
            {
                row.Complain(column, "a value", $"{column} of channel {name} is missing.");
            }

            return null;
        }

        double? supplyMin = Needed("Supply min");
        double? supplyMax = Needed("Supply max");
        double? dropMin = Needed("Load drop min");
        double? dropMax = Needed("Load drop max");
        double? currentMin = Needed("Current min");
        double? currentMax = Needed("Current max");
        double? ambientMin = Needed("Ambient min");
        double? ambientMax = Needed("Ambient max");
        double? peak = row.Number("Supply peak")?.Value;
        double? nominal = row.Number("Current nominal")?.Value;
        double? slope = row.Number("Load slope")?.Value;
        double? leds = row.Number("LEDs")?.Value;
        double? duty = row.Number("Duty max")?.Value;
        Frequency? frequency = row.Number("Frequency") is { } f ? Frequency.FromHertz(f.Value) : null;
        Current? off = row.Number("Off current max") is { } o ? Current.FromAmperes(o.Value) : null;
        double? sharing = row.Number("Sharing max")?.Value;
        if (supplyMin is null || supplyMax is null || dropMin is null || dropMax is null || currentMin is null || currentMax is null
            || ambientMin is null || ambientMax is null)
        {
            return null;
        }

        if (leds is { } count && count != Math.Floor(count))
        {
            row.Complain("LEDs", "a whole number", "The number of LEDs is a whole number.");
        }

        double strings = row.Number("Strings")?.Value ?? 1;
        if (strings != Math.Floor(strings))
        {
            row.Complain("Strings", "a whole number", "The number of strings is a whole number.");
        }
        else if (named % strings != 0)
        {
            row.Complain("LED", "as many LEDs in each string", string.Create(CultureInfo.InvariantCulture, $"{named} LEDs do not make {strings} equal strings."));
        }

        if (leds > 0 && named > leds * strings)
        {
            row.Complain(
                "LED", "the references of the load's LEDs",
                string.Create(CultureInfo.InvariantCulture, $"LED names {named} LEDs, and LEDs times Strings is {leds * strings}."));
        }

        if (leds is null && row.Text("LEDs") is null or "-" && named > 0)
        {
            leds = Math.Ceiling(named / strings);
            assumed.Add(new Assumption("LEDs", name, leds.Value.ToString(CultureInfo.InvariantCulture)));
        }
        else if (leds is null && row.Text("LEDs") is null or "-")
        {
            // 3.3 V a LED: the usual drop of a white one (common practice, no source).
            leds = Math.Ceiling(dropMax.Value / 3.3);
            assumed.Add(new Assumption("LEDs", name, leds.Value.ToString(CultureInfo.InvariantCulture)));
        }

        return new ChannelConditions
        {
            Supply = new(Voltage.FromVolts(supplyMin.Value), Voltage.FromVolts(supplyMax.Value)),
            SupplyPeak = Voltage.FromVolts(peak ?? supplyMax.Value),
            LoadDrop = new(Voltage.FromVolts(dropMin.Value), Voltage.FromVolts(dropMax.Value)),
            LoadSlope = Resistance.FromOhms(slope ?? 0),
            Leds = (int)(leds ?? 0),
            Strings = (int)strings,
            StringShareMax = row.Number("String share max")?.Value,
            CurrentWindow = new(Current.FromAmperes(currentMin.Value), Current.FromAmperes(currentMax.Value)),
            CurrentNominal = Current.FromAmperes(nominal ?? ((currentMin.Value + currentMax.Value) / 2)),
            Ambient = new(Temperature.FromKelvins(ambientMin.Value), Temperature.FromKelvins(ambientMax.Value)),
            Duty = duty ?? 1,
            Frequency = frequency,
            OffCurrentMax = off,
            SharingMax = sharing,
            Mounting = row.Text("Mounting"),
            Derating = row.Text("Derating"),
        };
    }

    private static bool Same(string? a, string? b) => string.Equals(a, b, StringComparison.OrdinalIgnoreCase);

    private sealed class ChannelValidator : AbstractValidator<ChannelConditions>
    {
        public ChannelValidator()
        {
            this.Demand("Supply min", c => c.Supply.Min.Volts <= c.Supply.Max.Volts, "a voltage at most Supply max", _ => "Supply min is above Supply max.");
            this.Demand("Supply peak", c => c.SupplyPeak.Volts >= c.Supply.Max.Volts, "a voltage at least Supply max", _ => "Supply peak is below Supply max.");
            this.Demand("Load drop min", c => c.LoadDrop.Min.Volts <= c.LoadDrop.Max.Volts, "a voltage at most Load drop max", _ => "Load drop min is above Load drop max.");
            this.Demand("Current min", c => c.CurrentWindow.Min.Amperes < c.CurrentWindow.Max.Amperes, "a current below Current max", _ => "Current min is not below Current max.");
            this.Demand("Current nominal", c => c.CurrentNominal.Amperes >= c.CurrentWindow.Min.Amperes && c.CurrentNominal.Amperes <= c.CurrentWindow.Max.Amperes, "a current inside the window", _ => "Current nominal lies outside Current min to Current max.");
            this.Demand("Ambient min", c => c.Ambient.Min.Kelvins <= c.Ambient.Max.Kelvins, "a temperature at most Ambient max", _ => "Ambient min is above Ambient max.");
            this.Demand("Duty max", c => c.Duty > 0, "a duty above 0 %", _ => "A duty of 0 never switches the channel on.");
            this.Demand("Sharing max", c => c.SharingMax is not { } s || s > 1, "a ratio above 1", _ => "Sharing max is a ratio to the mean: it is above 1.");
            this.Demand("Load slope", c => c.Leds == 0 || c.LoadDrop.Min.Volts - (c.CurrentNominal.Amperes * c.LoadSlope.Ohms) > 0, "a smaller resistance", _ => "The slope alone would drop more than the whole load at the nominal current.");
        }
    }
}
