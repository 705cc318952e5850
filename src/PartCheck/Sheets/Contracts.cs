using System.Globalization;

namespace PartCheck.Sheets;

/// <summary>Where complaints are collected.</summary>
public sealed class ComplaintList
{
    /// <summary>Most complaints that are listed; those beyond are counted.</summary>
    public const int Most = 1000;

    private readonly List<Complaint> items = [];
    private int unlisted;

    /// <summary>All complaints so far, in the order in which they were found; past <see cref="Most"/> a last one that says how many there are more.</summary>
    public IReadOnlyList<Complaint> Items => unlisted == 0 ? items : [.. items, Rest()];

    /// <summary>Adds one. One that ends the reading of a file is always listed.</summary>
    public void Add(Complaint complaint)
    {
        ArgumentNullException.ThrowIfNull(complaint);
        if (items.Count < Most || complaint.Fatal || complaint.NoInput)
        {
            items.Add(complaint);
        }
        else
        {
            unlisted++;
        }
    }

    private Complaint Rest() => new(
        items[^1].File, null, null, null, null, null, null,
        $"{unlisted.ToString(CultureInfo.InvariantCulture)} further complaints are not listed: put these right first.");
}
