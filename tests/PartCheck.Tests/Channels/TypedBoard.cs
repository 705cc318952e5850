using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Sheets;
using PartCheck.Tests.Bills;

namespace PartCheck.Tests.Channels;

/// <summary>A small board as typed: one channel row by column, a bill and a part table, read and bound.</summary>
internal sealed class TypedBoard
{
    private readonly TypedSheet typed = new();

    public Dictionary<string, string> Row { get; } = new(StringComparer.Ordinal)
    {
        ["Channel"] = "CH1",
        ["Supply min"] = "11.4",
        ["Supply max"] = "12.6",
        ["Load drop min"] = "8.5",
        ["Load drop max"] = "9.5",
        ["LEDs"] = "3",
        ["Current min"] = "12mA",
        ["Current max"] = "28mA",
        ["Logic"] = "P5",
        ["Ambient min"] = "0",
        ["Ambient max"] = "45",
        ["Pass"] = "Q1",
        ["Sense"] = "R1",
        ["Control"] = "Q2",
        ["Feed"] = "R2",
    };

    /// <summary>Rows of the channels sheet after the first; each a change to it.</summary>
    public List<(string Column, string Text)[]> Further { get; } = [];

    public List<string> Bill { get; } =
    [
        "References|Part number|Manufacturer|Fitted|Channel|Role",
        "Q1, Q3|TQ-31", "Q2|TQ-30", "R1, R3|RK-33", "R2|RK-4K7", "R8, R9|RK-100", "R10|RK-0",
    ];

    public List<string> Parts { get; } =
    [
        "Part number|Kind|Manufacturer|Mounting|Resistance",
        "TQ-31|npn|Tarnwood", "TQ-30|npn|Tarnwood", "RK-33|resistor|||33", "RK-4K7|resistor|||4k7", "RK-100|resistor|||100", "RK-0|resistor|||0R",
    ];

    public IReadOnlyList<Complaint> Complaints => typed.Complaints;

    public IReadOnlyList<Channel> Bind()
    {
        string[] columns = [.. Row.Keys.Concat(Further.SelectMany(f => f).Select(f => f.Column)).Distinct()];
        List<string> lines = [string.Join('|', columns), string.Join('|', columns.Select(c => Row.GetValueOrDefault(c)))];
        foreach ((string Column, string Text)[] change in Further)
        {
            lines.Add(string.Join('|', columns.Select(c => change.Any(f => f.Column == c) ? change.First(f => f.Column == c).Text : Row.GetValueOrDefault(c))));
        }

        Bill bill = BillReader.Read(TypedSheet.Of("b.csv", [.. Bill]), typed.Spellings, typed.List)!;
        PartTable parts = PartTableReader.Combine(PartTableReader.Read(TypedSheet.Of("p.csv", [.. Parts]), null, typed.Spellings, typed.List), typed.List);
        IReadOnlyList<LogicPin> pins = LogicPinReader.Read(
            TypedSheet.Of("pins.csv", "Name|Output|Supply min|Supply max|High min|High current", "P5|cmos|4.75|5.25|4.25|8mA", "P3|cmos|3|3.6|2.4|2mA"), typed.Spellings, typed.List);
        IReadOnlyList<ChannelRow> rows = ChannelReader.Read(TypedSheet.Of("c.csv", [.. lines]), bill, pins, typed.Spellings, typed.List);
        return ChannelBinder.Bind(rows, bill, parts, pins, typed.List);
    }

    public string Only() => typed.Only();
}
