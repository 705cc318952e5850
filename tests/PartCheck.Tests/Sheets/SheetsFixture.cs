using System.Text;
using PartCheck.Sheets;
using Xunit;

namespace PartCheck.Tests.Sheets;

/// <summary>A folder for files that a test makes, and a short way to tables.</summary>
public abstract class SheetsFixture : IDisposable
{
    private readonly string folder = Directory.CreateTempSubdirectory("partcheck-tables-").FullName;

    /// <summary>What was complained about.</summary>
    protected ComplaintList Complaints { get; } = new();

    /// <summary>The path of a file in the test's folder.</summary>
    protected string At(string name) => Path.Combine(folder, name);

    /// <summary>Reads a CSV text.</summary>
    protected SheetData Csv(string text) => Csv(Encoding.UTF8.GetBytes(text));

    /// <summary>Reads CSV bytes that must be readable.</summary>
    protected SheetData Csv(byte[] bytes, string? encoding = null) => Assert.Single(Read(bytes, encoding));

    /// <summary>Reads CSV bytes.</summary>
    protected IReadOnlyList<SheetData> Read(byte[] bytes, string? encoding = null)
    {
        File.WriteAllBytes(At("table.csv"), bytes);
        return SheetFile.Read(At("table.csv"), "table.csv", encoding, Complaints);
    }

    /// <summary>Finds a table with the project's own spellings; it must be there.</summary>
    protected Table Find(SheetData sheet, string name, params ColumnSpec[] columns)
    {
        Table? table = Table.Find(sheet, name, columns, ColumnSpellings.Load(null, Complaints), Complaints);
        Assert.NotNull(table);
        return table;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        Directory.Delete(folder, recursive: true);
        GC.SuppressFinalize(this);
    }
}
