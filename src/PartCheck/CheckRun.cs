using System.Globalization;
using System.Security.Cryptography;
using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Concessions;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;
using PartCheck.Workings;

namespace PartCheck;

/// <summary>What a run of <c>check</c> is asked.</summary>
public sealed record CheckRequest
{
    /// <summary>Boards: workbooks or folders, as given.</summary>
    public required IReadOnlyList<string> Boards { get; init; }

    /// <summary>Part tables; empty: each board's own.</summary>
    public IReadOnlyList<string> Parts { get; init; } = [];

    /// <summary>A bill apart from the board, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Bill { get; init; }

    /// <summary>A channels table apart from the board, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Channels { get; init; }

    /// <summary>Derating table: a name or a file; null: <c>workshop</c>.</summary>
    public string? Derating { get; init; }

    /// <summary>Logic pins file; null: the board's, else the project's own.</summary>
    public string? Pins { get; init; }

    /// <summary>Other parts to judge the board with, beside the bill as it stands; empty: the bill as it stands.</summary>
    public IReadOnlyList<AskedChange> With { get; init; } = [];

    /// <summary>The assembly to judge, as a column <c>Populated NAME</c> of the bill names it; null: the board as its bill stands.</summary>
    public string? Assembly { get; init; }

    /// <summary>A concessions table, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Concessions { get; init; }

    /// <summary>The day that concessions are held against; null: none is given, and a board that has concessions cannot be judged.</summary>
    public DateOnly? Date { get; init; }

    /// <summary>Further header spellings; null: none.</summary>
    public string? Columns { get; init; }

    /// <summary>Name of the text encoding of CSV files; null: found out.</summary>
    public string? Encoding { get; init; }

    /// <summary>Threads to use; 0: all. The output does not depend on it.</summary>
    public int Threads { get; init; }
}

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

        private List<JudgedChannel> JudgeChannels(IReadOnlyList<Channel> channels, DeratingTable runDerating, CancellationToken cancel)
        {
            List<JudgedChannel> judged = [.. channels.Select(c => new JudgedChannel(c, TableOf(c, runDerating)))];
            foreach (JudgedChannel channel in judged)
            {
                foreach (BoundChannel reading in channel.Channel.Readings)
                {
                    ChannelModel model = new(reading, Variants);
                    if (model.Pass.Append(model.Control).Distinct().FirstOrDefault(v => v.CardFault is not null) is { } wrong)
                    {
                        channel.CardFault = wrong;
                        continue;
                    }

                    channel.Models.Add(model);
                }
            }

            foreach (IGrouping<TransistorVariants, JudgedChannel> fault in judged.Where(j => j.CardFault is not null).GroupBy(j => j.CardFault!))
            {
                Transistor part = fault.Key.Part;
                complaints.Add(Complaint.At(
                    part.Card!.Cell, "Model", part.Card.Value.Name, "this part's own card",
                    $"The model card of {part.PartNumber} is another part's, or wrong: {fault.Key.CardFault}.") with
                { Channel = fault.First().Channel.Name });
                foreach (JudgedChannel channel in fault)
                {
                    channel.Models.Clear();
                }
            }

            // Feeds on one pin lower each other's level, elements of one package warm each other: first each channel alone, then with
            // what the others draw and dissipate.
            List<IGrouping<string, JudgedChannel>> pins = [.. judged.Where(j => j.Models.Count > 0).GroupBy(PinKey, StringComparer.OrdinalIgnoreCase)];
            Dictionary<string, double> powers = new(StringComparer.OrdinalIgnoreCase);
            foreach (JudgedChannel feed in pins.SelectMany(p => p).Where(f => f.HasNeighbours || pins.Any(p => p.Count() > 1 && p.Contains(f))))
            {
                List<ReadingJudgement> alone = [.. feed.Models.Select(m => Judgement(feed, m, 0, cancel))];
                feed.AloneCurrent = alone.Max(r => r.PinMax);
                foreach ((string reference, double watts) in alone.SelectMany(r => r.MostPower))
                {
                    powers[reference] = Math.Max(powers.GetValueOrDefault(reference), watts);
                }
            }

            foreach (JudgedChannel feed in judged.Where(j => j.HasNeighbours))
            {
                List<ChannelModel> warmed = [.. feed.Models.Select(m => new ChannelModel(m.Channel, Variants, powers))];
                feed.Models.Clear();
                feed.Models.AddRange(warmed);
                feed.MissingNeighbour = warmed.Select(m => m.Package.Missing).FirstOrDefault(m => m is not null);
            }

            foreach (IGrouping<string, JudgedChannel> pin in pins)
            {
                List<JudgedChannel> feeds = [.. pin];
                foreach (JudgedChannel feed in feeds)
                {
                    double others = feeds.Where(f => f != feed).Sum(f => f.AloneCurrent);
                    feed.Readings.AddRange(feed.Models.Select(m => Measured(feed, m, others, cancel)));
                }
            }

            return judged;
        }

        /// <summary>A reading's judgement with its test limits; what another bill of this run has in common with this one is judged once.</summary>
        private ReadingJudgement Measured(JudgedChannel channel, ChannelModel model, double others, CancellationToken cancel)
        {
            string key = string.Create(CultureInfo.InvariantCulture, $"{others:R} {Identity(model)} {channel.Channel.Name}");
            if (!judgements.TryGetValue(key, out ReadingJudgement? made))
            {
                made = Judgement(channel, model, others, cancel) with
                {
                    TestLimits = TestLimits.Of(model.Channel, Variants, new PinSource(model.Channel.Logic, others), request.Threads, cancel),
                };
                judgements[key] = made;
            }

            return made;
        }

        /// <summary>The lines and part rows of a reading, and what other channels warm its packages with, as one text.</summary>
        private string Identity(ChannelModel model)
        {
            int Of(object thing)
            {
                identities.TryAdd(thing, identities.Count);
                return identities[thing];
            }

            IEnumerable<string> parts = model.Channel.Placements.Select(p => string.Create(CultureInfo.InvariantCulture, $"{p.Role}{p.Leg}:{Of(p.Line)}:{Of(p.Part)}"));
            IEnumerable<string> warmth = Enumerable.Range(0, model.Channel.Legs.Count + 1).Select(d => model.Package.NeighbourPower(d).ToString("R", CultureInfo.InvariantCulture));
            return string.Join(',', parts.Concat(warmth));
        }

        private ReadingJudgement Judgement(JudgedChannel channel, ChannelModel model, double others, CancellationToken cancel) =>
            new ChannelJudge(model, channel.Derating).Judge(new PinSource(model.Channel.Logic, others), request.Threads, cancel);

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

        private static List<Finding> JudgePins(IReadOnlyList<JudgedChannel> judged, DeratingTable derating)
        {
            List<Finding> findings = [];
            foreach (IGrouping<string, JudgedChannel> pin in judged.Where(j => j.Channel.Readings.Count > 0).GroupBy(PinKey, StringComparer.OrdinalIgnoreCase))
            {
                LogicPin logic = pin.First().Channel.Readings[0].Logic;
                findings.Add(PinCurrentRule.Judge(
                    PinName(pin.First().Channel.Readings[0]), [.. pin.Select(j => PinFeed.Of(j.Channel.Name, j.Readings))], logic, derating) with
                {
                    Mix = [.. pin.Where(j => j.Readings.Count > 0).SelectMany(j => j.Readings.MaxBy(r => r.PinMax)!.Channel.Mix)],
                });
            }

            return findings;
        }

        private static string PinName(BoundChannel channel) => channel.Pin ?? channel.Name;

        private static string PinKey(JudgedChannel judged) =>
            judged.Channel.Readings[0] is { Pin: { } net } ? "net " + net : "own " + judged.Channel.Name;

        private TransistorVariants Variants(Transistor part)
        {
            if (!variants.TryGetValue(part, out TransistorVariants? made))
            {
                made = new TransistorVariants(part);
                variants[part] = made;
            }

            return made;
        }

        /// <summary>A part number that the table does not have is looked for by its near misses: suggested, never taken.</summary>
        private static IEnumerable<Advice> MistypedAdvice(Bill bill, PartTable parts, IReadOnlyList<Channel> channels)
        {
            HashSet<string> serving = ElementReference.WithPackages(channels.SelectMany(c => c.References));
            foreach (BillLine line in bill.Lines.Where(l => l.PartNumber is { } number && parts.Find(number).Count == 0 && l.References.Any(serving.Contains)))
            {
                if (NearMisses.Of(line.PartNumber!, parts.Parts.Select(p => p.PartNumber)) is { Count: > 0 } near)
                {
                    yield return new Advice(null, line.References[0], $"The part table has no row {line.PartNumber}; is {string.Join(" or ", near)} meant?");
                }
            }
        }

        /// <summary>Remarks on parts and circuits that no rule judges.</summary>
        private static IEnumerable<Advice> CircuitAdvice(IReadOnlyList<Channel> channels)
        {
            List<string> floating = [.. channels.Where(c => c.Readings.Count > 0 && c.Readings[0].PullDown is null).Select(c => c.Name)];
            if (floating.Count > 0)
            {
                yield return new Advice(null, null, $"{string.Join(", ", floating)}: no pull-down; while the pin floats at reset nothing holds the channel off.");
            }

            foreach (BoundChannel channel in channels.Where(c => c.Readings.Count > 0).Select(c => c.Readings[0]))
            {
                int load = channel.Conditions.Leds * channel.Conditions.Strings;
                if (channel.Leds.Count > 0 && channel.Leds.Count < load)
                {
                    yield return new Advice(
                        channel.Name, null, string.Create(CultureInfo.InvariantCulture, $"LED names {channel.Leds.Count} of the load's {load} LEDs; the others are not judged."));
                }
            }

            IEnumerable<Part> used = channels.SelectMany(c => c.Readings).SelectMany(r => r.Placements).Select(p => p.Part).Distinct()
                .OrderBy(p => p.PartNumber, StringComparer.Ordinal);
            foreach (Part part in used)
            {
                if (part.Lifecycle is { } lifecycle && !lifecycle.Equals("active", StringComparison.OrdinalIgnoreCase))
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: lifecycle \"{lifecycle}\".");
                }

                if (part.Stock is 0)
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: none in stock.");
                }

                if (part is ResistorPart { Resistance.Value.Ohms: > 0 and var ohms }
                    && !PreferredValues.Contains(PreferredSeries.E24, ohms) && !PreferredValues.Contains(PreferredSeries.E96, ohms))
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: {EngineeringNotation.Format(ohms, "ohm")} is neither an E24 nor an E96 value.");
                }
            }
        }

        /// <summary>Remarks on what heat and a single fault would do, of each channel's worst reading.</summary>
        private IEnumerable<Advice> FaultAdvice(IReadOnlyList<JudgedChannel> judged, CancellationToken cancel)
        {
            foreach (JudgedChannel channel in judged.Where(j => j.Readings.Count > 0))
            {
                int hot = channel.Readings.FindIndex(r => HotNeighbour.Text(channel.Models[channel.Readings.IndexOf(r)], r) is not null);
                if (hot >= 0)
                {
                    yield return new Advice(
                        channel.Channel.Name, channel.Models[hot].Channel.Control.Reference, HotNeighbour.Text(channel.Models[hot], channel.Readings[hot])!);
                }

                double supply = channel.Models[0].Channel.Conditions.Supply.Max.Volts;
                string shorted = channel.Models
                    .Select(m => ShortedLoad.Judge(m.Channel, Variants, new PinSource(m.Channel.Logic), request.Threads, cancel))
                    .OrderByDescending(j => j.Count(s => s.Stress.Verdict == Verdict.Nonconforming))
                    .ThenByDescending(j => j.Max(s => s.Stress.Ratio ?? 0))
                    .Select(j => ShortedLoad.Text(supply, j)).First();
                yield return new Advice(channel.Channel.Name, null, shorted);
            }
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

    /// <summary>A channel on its way through the run.</summary>
    private sealed class JudgedChannel(Channel channel, DeratingTable derating)
    {
        public Channel Channel => channel;

        public DeratingTable Derating => derating;

        public List<ChannelModel> Models { get; } = [];

        public List<ReadingJudgement> Readings { get; } = [];

        public TransistorVariants? CardFault { get; set; }

        public double AloneCurrent { get; set; }

        public bool HasNeighbours => Models.Exists(m => m.Channel.Neighbours.Count > 0);

        public string? MissingNeighbour { get; set; }

        public IReadOnlyList<string> MissingData =>
        [
            .. channel.Missing,
            .. CardFault is null ? (string[])[] : [$"a right model card of {CardFault.Part.PartNumber}"],
            .. MissingNeighbour is null ? (string[])[] : [MissingNeighbour],
            .. derating.Unknown ? (string[])[$"derating table {derating.Name}"] : [],
        ];
    }
}
