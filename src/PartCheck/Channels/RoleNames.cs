namespace PartCheck.Channels;

/// <summary>Roles as columns and bills write them.</summary>
public static class RoleNames
{
    /// <summary>Stands in Averaging for a leg that the control does not sense.</summary>
    public const string NotSensed = "-";

    /// <summary>Stands in Averaging for the one leg whose emitter is the control's base node, without a resistor.</summary>
    public const string Direct = "direct";

    /// <summary>Each role with its column.</summary>
    public static IReadOnlyList<(Role Role, string Column)> Columns { get; } =
    [
        (Role.Pass, "Pass"), (Role.Sense, "Sense"), (Role.Control, "Control"), (Role.Feed, "Feed"),
        (Role.Averaging, "Averaging"), (Role.PullDown, "Pull-down"), (Role.Led, "LED"),
    ];

    /// <summary>False for a mark that stands in Averaging instead of a reference.</summary>
    public static bool IsReference(string text) => text != NotSensed && !IsDirect(text);

    /// <summary>True for the mark of a leg without an averaging resistor.</summary>
    public static bool IsDirect(string text) => string.Equals(text, Direct, StringComparison.OrdinalIgnoreCase);

    /// <summary>A role's column inside a sentence.</summary>
    public static string Spoken(string column)
    {
        ArgumentNullException.ThrowIfNull(column);
        return column == "LED" ? column : column.ToLowerInvariant();
    }

    /// <summary>The column of a role.</summary>
    public static string ColumnOf(Role role) => Columns.First(c => c.Role == role).Column;

    /// <summary>The role that a text names; null: none.</summary>
    public static Role? Of(string? text)
    {
        foreach ((Role role, string column) in Columns)
        {
            if (string.Equals(column, text, StringComparison.OrdinalIgnoreCase)
                || string.Equals(column.Replace("-", string.Empty, StringComparison.Ordinal), text?.Replace(" ", string.Empty, StringComparison.Ordinal), StringComparison.OrdinalIgnoreCase))
            {
                return role;
            }
        }

        return null;
    }
}
