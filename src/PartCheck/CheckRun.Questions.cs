using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Concessions;
using PartCheck.Derating;
using PartCheck.Parts;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck;

/// <content>What is asked of a board beside its own verdict: other parts, one assembly, a day for its concessions.</content>
public static partial class CheckRun
{
    private sealed partial class BoardCheck
    {
        /// <summary>The board with the parts asked for, compared with the bill as it stands.</summary>
        private BoardReport WithChanges(
            Bill bill, IReadOnlyList<ChannelRow> rows, PartTable parts, IReadOnlyList<LogicPin> pins, DeratingTable derating, CancellationToken cancel)
        {
            // An input that is not there is told first: without it nothing asked for can be found.
            if (parts.Parts.Count == 0 || complaints.Items.Any(c => c.Fatal || c.NoInput))
            {
                return Unread(derating);
            }

            List<LineChange> changes = ReadChanges(bill, rows, parts);
            if (usage.Count > 0)
            {
                return Unread(derating);
            }

            // What only the replaced parts have wrong is no complaint about the board that was asked for.
            ComplaintList asked = complaints;
            complaints = new ComplaintList();
            BoardReport before = Judged(bill, rows, parts, pins, derating, [], cancel);
            complaints = asked;
            BoardReport after = Judged(BillChanges.Apply(bill, changes), rows, parts, pins, derating, changes, cancel, before.Findings);
            double? Ohms(string? part) => part is not null && parts.Find(part) is [ResistorPart resistor, ..] ? resistor.Resistance.Value.Ohms : null;
            return after with
            {
                Comparison = BoardComparison.Of(
                    before, after,
                    [.. changes.Select(c => new PartChange(c.References, c.Line.PartNumber, c.PartNumber, c.Manufacturer, Ohms(c.Line.PartNumber), Ohms(c.PartNumber)))],
                    [.. rows.Where(r => changes.Any(c => Serves(r, c.References))).Select(r => r.Name)]),
            };
        }

        private List<LineChange> ReadChanges(Bill bill, IReadOnlyList<ChannelRow> rows, PartTable parts)
        {
            List<LineChange> changes = [];
            HashSet<string> changed = new(StringComparer.OrdinalIgnoreCase);
            foreach (AskedChange asked in request.With)
            {
                if (BillChanges.Find(bill, asked.Line, out IReadOnlyList<(BillLine Line, IReadOnlyList<string> References)> found) is { } wrong)
                {
                    usage.Add(wrong);
                }
                else if (!rows.Any(r => found.Any(f => Serves(r, f.References))))
                {
                    usage.Add($"\"{asked.Line}\" serves no channel: nothing here judges it.");
                }

                if (parts.Named(asked.PartNumber) is not { } part)
                {
                    string unread = complaints.Items.Count == 0 ? string.Empty
                        : "; there are complaints about the inputs, which the run without --with lists";
                    usage.Add($"\"{asked.PartNumber}\" is not in the part table{NearMisses.Phrase(asked.PartNumber, parts.Parts.Select(p => p.PartNumber))}{unread}.");
                    continue;
                }

                foreach ((BillLine line, IReadOnlyList<string> references) in found)
                {
                    usage.AddRange(references.Where(r => !changed.Add(r)).Select(r => $"{r} is changed twice."));
                    LineChange change = new(line, references, part.PartNumber, part.Manufacturer);
                    int same = changes.FindIndex(c => ReferenceEquals(c.Line, line) && (c.PartNumber, c.Manufacturer) == part);
                    if (same < 0)
                    {
                        changes.Add(change);
                    }
                    else
                    {
                        changes[same] = change with { References = [.. changes[same].References, .. references] };
                    }
                }
            }

            return changes;
        }

        private static bool Serves(ChannelRow row, IReadOnlyList<string> references) =>
            ElementReference.WithPackages(RoleNames.Columns.SelectMany(c => row.Placed(c.Role))).Overlaps(references);

        /// <summary>True where no reference of a channel is fitted: the channel is not there.</summary>
        private static bool LeftOut(ChannelRow row, Bill bill)
        {
            List<string> references = [.. RoleNames.Columns.SelectMany(c => row.Placed(c.Role))];
            return references.Count > 0 && references.TrueForAll(reference =>
                bill.Lines.FirstOrDefault(l => l.Holds(reference)) is { Fitted: false, HasComplaints: false });
        }

        /// <summary>The board's concessions; those without a part number do not hold for parts put in another's place.</summary>
        private ConcessionBook BookOf(IReadOnlyList<ChannelRow> rows, IReadOnlyList<LineChange> changes, IReadOnlyList<Finding>? before) => new(
            ConcessionBook.Of(concessions ?? [], Names()), request.Date ?? default,
            changes.SelectMany(c => c.References).ToHashSet(StringComparer.OrdinalIgnoreCase),
            rows.Where(r => changes.Any(c => Serves(r, c.References))).Select(r => r.Name).ToHashSet(StringComparer.Ordinal))
        {
            Before = before,
        };

        private IEnumerable<Advice> ConcessionAdvice(ConcessionBook book)
        {
            foreach (string remark in book.Remarks)
            {
                yield return new Advice(null, null, remark);
            }

            IReadOnlyList<Concession> mine = ConcessionBook.Of(concessions ?? [], Names());
            List<string> others = [.. (concessions ?? []).Except(mine).Select(c => c.Board!).Distinct(StringComparer.OrdinalIgnoreCase)];
            if (others.Count > 0)
            {
                yield return new Advice(null, null, $"Concessions for other boards are left alone: {string.Join(", ", others)}.");
            }
        }

        /// <summary>Names that a concession may give the board: as shown, its own name, its name without extension.</summary>
        private string[] Names()
        {
            string name = Path.GetFileName(Path.TrimEndingDirectorySeparator(Path.GetFullPath(board)));
            return [BoardSource.Shown(board), name, Path.GetFileNameWithoutExtension(name)];
        }
    }
}
