using System.IO.Compression;
using System.Xml;

namespace PartCheck.Sheets;

/// <summary>The parts of an .xlsx package: relations between them, and each part as XML with its size limited and no document types.</summary>
internal sealed class XlsxPackage : IDisposable
{
    /// <summary>What all parts that are read may unpack to [bytes]: a bill of 100 000 lines needs a tenth of it.</summary>
    private const long MostUnpacked = 256L << 20;

    private readonly ZipArchive zip;
    private readonly Dictionary<string, ZipArchiveEntry> parts = new(StringComparer.OrdinalIgnoreCase);
    private long left = MostUnpacked;

    internal XlsxPackage(Stream stream)
    {
        zip = new ZipArchive(stream, ZipArchiveMode.Read, leaveOpen: true);
        foreach (ZipArchiveEntry entry in zip.Entries)
        {
            parts.TryAdd(entry.FullName.Replace('\\', '/').TrimStart('/'), entry);
        }
    }

    /// <summary>One relation of a part.</summary>
    internal readonly record struct Relation(string Id, string Type, string Target);

    public void Dispose() => zip.Dispose();

    /// <summary>True where the package has the part.</summary>
    internal bool Has(string part) => parts.ContainsKey(part);

    /// <summary>Opens a part; the caller disposes of it.</summary>
    /// <exception cref="InvalidDataException">There is no such part, or it is too large.</exception>
    internal XmlReader Open(string part)
    {
        if (!parts.TryGetValue(part, out ZipArchiveEntry? entry))
        {
            throw new InvalidDataException($"it has no part {part}.");
        }

        if (entry.Length > left)
        {
            throw new InvalidDataException($"its parts unpack to more than 256 MiB; part {part} is too large.");
        }

        XmlReaderSettings settings = new()
        {
            DtdProcessing = DtdProcessing.Prohibit,
            XmlResolver = null,
            IgnoreComments = true,
            IgnoreProcessingInstructions = true,
            MaxCharactersInDocument = Math.Max(1, left),
            CloseInput = true,
        };
        left -= entry.Length;
        return XmlReader.Create(new MarkupLimit(entry.Open()), settings);
    }

    /// <summary>The relations of a part (of the package itself: an empty name); none where it has none.</summary>
    internal List<Relation> RelationsOf(string part)
    {
        int slash = part.LastIndexOf('/');
        string folder = part[..(slash + 1)];
        string file = $"{folder}_rels/{part[(slash + 1)..]}.rels";
        List<Relation> relations = [];
        if (!Has(file))
        {
            return relations;
        }

        using XmlReader x = Open(file);
        while (x.Read())
        {
            if (x.NodeType == XmlNodeType.Element && x.LocalName == "Relationship" && x.GetAttribute("TargetMode") != "External")
            {
                relations.Add(new Relation(
                    x.GetAttribute("Id") ?? string.Empty, x.GetAttribute("Type") ?? string.Empty, Resolved(folder, x.GetAttribute("Target") ?? string.Empty)));
            }
        }

        return relations;
    }

    /// <summary>The target of the first relation whose type ends so; null where there is none.</summary>
    internal string? TargetOf(string part, string typeEnd)
    {
        foreach (Relation relation in RelationsOf(part))
        {
            if (relation.Type.EndsWith(typeEnd, StringComparison.Ordinal))
            {
                return relation.Target;
            }
        }

        return null;
    }

    private static string Resolved(string folder, string target)
    {
        List<string> steps = [];
        string whole = target.StartsWith('/') ? target[1..] : folder + target;
        foreach (string step in whole.Split('/', StringSplitOptions.RemoveEmptyEntries))
        {
            if (step == ".." && steps.Count > 0)
            {
                steps.RemoveAt(steps.Count - 1);
            }
            else if (step is not "." and not "..")
            {
                steps.Add(step);
            }
        }

        return string.Join('/', steps);
    }
}
