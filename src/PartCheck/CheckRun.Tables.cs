using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.Parts;
using PartCheck.Reports;
using PartCheck.Sheets;

namespace PartCheck;

/// <content>The tables of a board: those given, those of the board, those of the tool.</content>
public static partial class CheckRun
{
    private sealed partial class BoardCheck
    {
        private SheetData? BillOf(string argument)
        {
            List<string> notes = [];
            SheetData? sheet = BillFile.SheetOf(source, argument, spellings, notes, complaints);
            advice.AddRange(notes.Select(note => new Advice(null, null, note)));
            return sheet;
        }

        /// <summary>What is doubtful in a line that serves a channel is a complaint; a quantity is the rule <c>bill</c>'s own matter.</summary>
        private Bill WithDoubts(Bill bill, IReadOnlyList<ChannelRow> rows)
        {
            HashSet<string> serving = ElementReference.WithPackages(rows.SelectMany(row => RoleNames.Columns.SelectMany(c => row.Placed(c.Role))));
            List<BillLine> lines = [];
            foreach (BillLine line in bill.Lines)
            {
                List<Complaint> doubts = line.References.Any(serving.Contains) ? [.. line.Doubts.Where(d => !d.IsCount)] : [];
                doubts.ForEach(complaints.Add);
                lines.Add(doubts.Count > 0 ? line with { HasComplaints = true } : line);
            }

            return bill with { Lines = lines };
        }

        private DeratingTable RunDerating()
        {
            string name = request.Derating ?? DefaultDerating;
            if (Find(name) is { } found)
            {
                return found;
            }

            if (File.Exists(BoardSource.Split(name).Path) && source.File(name, "Derating") is { } sheet)
            {
                IReadOnlyList<DeratingTable> tables = DeratingReader.Read(sheet, spellings, complaints);
                if (tables.Count == 1)
                {
                    return tables[0];
                }

                complaints.Add(new Complaint(
                    sheet.File, sheet.Sheet, null, "Name", null, null, "rows of one table",
                    tables.Count == 0 ? "The file holds no derating table." : "The file holds several derating tables: name one a file."));
                return tables.Count > 0 ? tables[0] : new DeratingTable(name, null, []);
            }

            complaints.Add(new Complaint(
                BoardSource.Shown(name), null, null, null, null, name, "one of " + string.Join(", ", DeratingLibrary.Names),
                $"There is no derating table \"{BoardSource.Shown(name)}\"."));
            return new DeratingTable(name, null, []);
        }

        private DeratingTable? Find(string name) =>
            ownDerating.FirstOrDefault(t => string.Equals(t.Name, name, StringComparison.OrdinalIgnoreCase)) ?? DeratingLibrary.Named(name);

        private PartTable ReadParts(bool exists)
        {
            List<Part> parts = [.. given];
            if (request.Parts.Count == 0 && exists && source.Table(board, "Parts", required: false) is { } sheet)
            {
                string folder = Directory.Exists(board) ? Path.GetFullPath(board) : Folder(board);
                parts.AddRange(PartTableReader.Read(sheet, folder, spellings, complaints));
            }
            else if (request.Parts.Count == 0)
            {
                complaints.Add(new Complaint(
                    BoardSource.Shown(board), null, null, null, null, null, "--parts FILE, or a table Parts with the board",
                    "No part table is given: nothing can be verified."));
            }

            return PartTableReader.Combine(parts, complaints);
        }

        private IReadOnlyList<LogicPin> ReadPins(bool exists)
        {
            SheetData? sheet = request.Pins is { } file ? source.File(file, "Pins")
                : exists ? source.Table(board, "Pins", required: false) : null;
            if (sheet is null && request.Pins is null)
            {
                sheet = SheetFile.Embedded("partdata/logic-pins.csv", complaints);
            }

            return sheet is null ? [] : LogicPinReader.Read(sheet, spellings, complaints);
        }

        private DeratingTable TableOf(Channel channel, DeratingTable runDerating)
        {
            if (channel.Derating is not { } name)
            {
                return runDerating;
            }

            if (Find(name) is { } table)
            {
                return table;
            }

            complaints.Add(Complaint.At(
                channel.Cell, "Derating", name, "one of " + string.Join(", ", DeratingLibrary.Names.Concat(ownDerating.Select(t => t.Name))),
                $"Channel {channel.Name} names the derating table \"{name}\", which there is not.") with
            { Channel = channel.Name });
            return new DeratingTable(name, null, []) { Unknown = true };
        }
    }
}
