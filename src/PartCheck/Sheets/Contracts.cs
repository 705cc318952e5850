namespace PartCheck.Sheets;

/// <summary>Where complaints are collected.</summary>
public sealed class ComplaintList
{
    private readonly List<Complaint> items = [];

    /// <summary>All complaints so far, in the order in which they were found.</summary>
    public IReadOnlyList<Complaint> Items => items;

    /// <summary>Adds one.</summary>
    public void Add(Complaint complaint) => items.Add(complaint);
}
