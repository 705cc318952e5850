using PartCheck.Sheets;

namespace PartCheck.Channels;

/// <summary>Columns of the channels sheet with their units and plausible ranges (SI).</summary>
public static class ChannelColumns
{
    /// <summary>All columns.</summary>
    public static IReadOnlyList<ColumnSpec> All { get; } =
    [
        new("Channel", ColumnKind.Text, Required: true),
        new("Supply min", ColumnKind.Voltage, 0.5, 1000, Required: true),
        new("Supply max", ColumnKind.Voltage, 0.5, 1000, Required: true),
        new("Supply peak", ColumnKind.Voltage, 0.5, 2000),
        new("Load drop min", ColumnKind.Voltage, 0.1, 1000),
        new("Load drop max", ColumnKind.Voltage, 0.1, 1000),
        new("Load slope", ColumnKind.Resistance, 0, 1e5),
        new("LEDs", ColumnKind.Number, 0, 1000),
        new("Strings", ColumnKind.Number, 1, 1000),
        new("String share max", ColumnKind.Number, 1, 1000),
        new("Current min", ColumnKind.Current, 0, 20),
        new("Current max", ColumnKind.Current, 1e-6, 20),
        new("Current nominal", ColumnKind.Current, 1e-6, 20),
        new("Logic", ColumnKind.Text),
        new("Pin", ColumnKind.Text),
        new("Ambient min", ColumnKind.Temperature, 173, 523),
        new("Ambient max", ColumnKind.Temperature, 173, 523),
        new("Duty max", ColumnKind.Percent, 0, 1),
        new("Frequency", ColumnKind.Frequency, 0.01, 1e7),
        new("Off current max", ColumnKind.Current, 0, 1),
        new("Sharing max", ColumnKind.Number, 0, 100),
        new("Mounting", ColumnKind.Text),
        new("Derating", ColumnKind.Text),
        new("Pass", ColumnKind.Text),
        new("Sense", ColumnKind.Text),
        new("Control", ColumnKind.Text),
        new("Feed", ColumnKind.Text),
        new("Averaging", ColumnKind.Text),
        new("Pull-down", ColumnKind.Text),
        new("Pull-down at", ColumnKind.Text),
        new("LED", ColumnKind.Text),
    ];
}
