using System.Security.Cryptography;
using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Concessions;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;
using PartCheck.Workings;

namespace PartCheck;

/// <summary>The run that knows every room: inputs at the left, reports at the right.</summary>
public static partial class CheckRun
{
    /// <summary>The derating table of a run that names none.</summary>
    public const string DefaultDerating = "workshop";

    /// <summary>Checks boards.</summary>
    /// <param name="request">What is asked.</param>
    /// <param name="cancel">Stops the run.</param>
    /// <returns>The report; the user's errors are complaints in it, never exceptions.</returns>
    public static CheckReport Run(CheckRequest request, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(request);
        ComplaintList complaints = new();
        BoardSource source = new(request.Encoding, complaints);
        ColumnSpellings spellings = ColumnSpellings.Load(request.Columns, complaints);
        List<Part> given = [];
        foreach (string file in request.Parts)
        {
            if (source.File(file, "Parts") is { } sheet)
            {
                given.AddRange(PartTableReader.Read(sheet, Folder(BoardSource.Split(file).Path), spellings, complaints));
            }
        }

        IReadOnlyList<Concession>? accepted = request.Concessions is { } table && source.File(table, "Concessions") is { } rows
            ? ConcessionReader.Read(rows, ofBoard: false, spellings, complaints) : null;
        List<BoardReport> boards = [];
        List<string> usage = [];
        foreach (string board in request.Boards)
        {
            cancel.ThrowIfCancellationRequested();
            boards.Add(new BoardCheck(request, board, source, spellings, given, accepted, complaints, usage).Run(cancel));
        }

        return new CheckReport(boards, complaints.Items, [.. source.Files.Select(Hashed)]) { UsageFaults = usage };
    }

    /// <summary>Works out findings of one channel of one board, step by step.</summary>
    /// <param name="request">What is asked; one board.</param>
    /// <param name="selection">Which findings.</param>
    /// <param name="fault">What the selection names and there is not; null: nothing is amiss.</param>
    /// <param name="cancel">Stops the run.</param>
    public static WorkingReport Work(CheckRequest request, WorkingSelection selection, out string? fault, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(request);
        ArgumentNullException.ThrowIfNull(selection);
        ArgumentOutOfRangeException.ThrowIfNotEqual(request.Boards.Count, 1, nameof(request));
        CheckReport check = Run(request, cancel);
        BoardReport board = check.Boards[0];
        fault = null;
        IReadOnlyList<Finding> findings = board.Channels.Count + board.ChannelsNotFitted.Count == 0 ? [] : selection.Of(board, out fault);
        return new WorkingReport(check, selection.Name(board) ?? string.Empty, [.. findings.Select(FindingWorking.Of)])
        {
            EveryCheck = selection.Rule is not null || selection.Reference is not null,
        };
    }

    private static string Folder(string file) => Path.GetDirectoryName(Path.GetFullPath(file)) ?? ".";

    private static InputFile Hashed((string Path, string Shown) file)
    {
        using FileStream stream = new(file.Path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite);
        return new InputFile(file.Shown, Convert.ToHexStringLower(SHA256.HashData(stream)));
    }

    /// <summary>One board of a run.</summary>
    private sealed partial class BoardCheck(
        CheckRequest request, string board, BoardSource source, ColumnSpellings spellings, List<Part> given,
        IReadOnlyList<Concession>? accepted, ComplaintList complaints, List<string> usage)
    {
        private readonly Dictionary<Transistor, TransistorVariants> variants = new(ReferenceEqualityComparer.Instance);
        private readonly List<Advice> advice = [];
        private readonly Dictionary<string, ReadingJudgement> judgements = new(StringComparer.Ordinal);
        private readonly Dictionary<object, int> identities = new(ReferenceEqualityComparer.Instance);
        private ComplaintList complaints = complaints;
        private IReadOnlyList<Concession>? concessions = accepted;
        private IReadOnlyList<DeratingTable> ownDerating = [];

        public BoardReport Run(CancellationToken cancel)
        {
            DeratingTable derating = RunDerating();
            bool exists = Directory.Exists(board) || File.Exists(board);
            if (!exists && (request.Bill is null || request.Channels is null))
            {
                complaints.Add(new Complaint(
                    BoardSource.Shown(board), null, null, null, null, null, "a workbook, or a folder with bom.csv and channels.csv",
                    "There is no such workbook or folder.")
                { Fatal = true, NoInput = true });
                return Unread(derating);
            }

            SheetData? billSheet = request.Bill is { } b ? BillOf(b) : source.Table(board, "BOM", required: true);
            SheetData? channelSheet = request.Channels is { } c ? source.File(c, "Channels") : source.Table(board, "Channels", required: true);
            if (exists && source.Table(board, "Derating", required: false) is { } deratingSheet)
            {
                ownDerating = DeratingReader.Read(deratingSheet, spellings, complaints);
                derating = request.Derating is null && ownDerating.Count == 1 ? ownDerating[0] : RunDerating();
            }

            if (request.Concessions is null && exists && source.Table(board, "Concessions", required: false) is { } concessionSheet)
            {
                if (request.Date is null)
                {
                    usage.Add($"{BoardSource.Shown(board)} has concessions: --date YYYY-MM-DD says for which day.");
                    return Unread(derating);
                }

                concessions = ConcessionReader.Read(concessionSheet, ofBoard: true, spellings, complaints);
            }

            PartTable parts = ReadParts(exists);
            IReadOnlyList<LogicPin> pins = ReadPins(exists);
            Bill? bill = billSheet is null ? null : BillReader.Read(billSheet, spellings, complaints, request.Assembly);
            IReadOnlyList<ChannelRow> rows = channelSheet is null ? [] : ChannelReader.Read(channelSheet, bill, pins, spellings, complaints);
            if (bill is null || rows.Count == 0)
            {
                return Unread(derating);
            }

            bill = WithDoubts(bill, rows);
            if (request.Assembly is { } wanted && bill.Assembly is null)
            {
                string has = bill.Assemblies.Count > 0 ? "it has " + string.Join(", ", bill.Assemblies) : $"no column such as \"Populated {wanted}\" names one";
                usage.Add($"the bill of {BoardSource.Shown(board)} has no assembly \"{wanted}\": {has}.");
                return Unread(derating);
            }

            if (request.Assembly is null && bill.Assemblies.Count > 0)
            {
                advice.Add(new Advice(null, null, $"The bill names assemblies: {string.Join(", ", bill.Assemblies)}. Their columns are left alone; --assembly judges one."));
            }

            List<ChannelRow> fitted = [.. rows.Where(r => bill.Assembly is null || !LeftOut(r, bill))];
            BoardReport report = request.With.Count == 0
                ? Judged(bill, fitted, parts, pins, derating, [], cancel)
                : WithChanges(bill, fitted, parts, pins, derating, cancel);
            return report with { Assembly = bill.Assembly, ChannelsNotFitted = [.. rows.Except(fitted).Select(r => r.Name)] };
        }

        private BoardReport Judged(
            Bill bill, IReadOnlyList<ChannelRow> rows, PartTable parts, IReadOnlyList<LogicPin> pins, DeratingTable derating,
            IReadOnlyList<LineChange> changes, CancellationToken cancel, IReadOnlyList<Finding>? before = null)
        {
            IReadOnlyList<Channel> channels = ChannelBinder.Bind(rows, bill, parts, pins, complaints);
            IReadOnlyList<Finding> billFindings = BillRule.Judge(bill, parts, channels);
            IReadOnlyList<JudgedChannel> judged = JudgeChannels(channels, derating, cancel);
            IReadOnlyList<Finding> pinFindings = JudgePins(judged, derating);
            ConcessionBook book = BookOf(rows, changes, before);
            BoardReport report = Report(
                derating, judged, [.. billFindings.Select(book.Apply)], [.. pinFindings.Select(book.Apply)], book.Apply, [.. advice, .. MistypedAdvice(bill, parts, channels), .. CircuitAdvice(channels), .. FaultAdvice(judged, cancel)]);
            return report with
            {
                ConcessionsAsOf = concessions is null ? null : request.Date,
                Advice = [.. report.Advice, .. ConcessionAdvice(book)],
            };
        }

        private BoardReport Unread(DeratingTable derating) => new()
        {
            Board = BoardSource.Shown(board),
            Verdict = Verdict.NotVerified,
            Derating = derating.Name,
            DeratingNote = derating.Note,
            Channels = [],
            Findings = [],
            Rules = RuleBook.Judged,
            RulesNotJudged = RuleBook.NotJudged,
            Assumed = [],
            Advice = advice,
            Cautions = Cautions.All,
        };

        private BoardReport Report(
            DeratingTable derating, IReadOnlyList<JudgedChannel> judged, IReadOnlyList<Finding> billFindings, IReadOnlyList<Finding> pinFindings,
            Func<ReadingJudgement, ReadingJudgement> conceded, IReadOnlyList<Advice> remarks)
        {
            List<ChannelJudgement> channels = [.. judged.Select(j => ChannelAssembly.Assemble(
                j.Channel, j.Derating.Name, [.. j.Readings.Select(conceded)], j.MissingData, [.. billFindings, .. pinFindings],
                [.. j.Channel.Assumed, .. j.Models.SelectMany(m => m.Assumed), .. j.Readings.SelectMany(r => r.Assumed)]))];
            List<string> names = [.. channels.Select(c => c.Channel)];
            IReadOnlyList<Finding> all = FindingOrder.WorstFirst(
                [.. channels.SelectMany(c => c.Findings), .. billFindings, .. pinFindings], names, RuleBook.Order);
            List<AssumedValue> assumed = [.. channels
                .SelectMany(c => c.Assumed.Select(a => (Assumption: a, c.Channel)))
                .GroupBy(p => p.Assumption)
                .Select(g => new AssumedValue(g.Key.What, g.Key.Of, g.Key.Value, [.. g.Select(p => p.Channel).Distinct().OrderBy(names.IndexOf)]))
                .OrderBy(a => a.What, StringComparer.Ordinal).ThenBy(a => a.Of, StringComparer.Ordinal).ThenBy(a => a.Value, StringComparer.Ordinal)];
            return new BoardReport
            {
                Board = BoardSource.Shown(board),
                Verdict = FindingSeverity.WorstOf(channels.Select(c => c.Verdict).Concat(all.Select(f => f.Verdict))),
                Derating = derating.Name,
                DeratingNote = derating.Note,
                Channels = channels,
                Findings = all,
                Totals = BoardTotals.Of(channels, pinFindings),
                Rules = RuleBook.Judged,
                RulesNotJudged = RuleBook.NotJudged,
                Assumed = assumed,
                Advice = remarks,
                Cautions = Cautions.All,
            };
        }
    }
}
