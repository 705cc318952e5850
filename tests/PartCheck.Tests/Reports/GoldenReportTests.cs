using System.Globalization;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;
using PartCheck.Tests.Golden;
using Xunit;

namespace PartCheck.Tests.Reports;

/// <summary>Reports of a report written by hand, against files approved by hand. A mismatch writes what came beside and fails.</summary>
public class GoldenReportTests
{
    [Theory]
    [InlineData("")]
    [InlineData("de-DE")]
    public void TextIsTheApprovedOneInAnyCulture(string culture) => In(culture, () => ApprovedFile.Holds("report.txt", TextReport.Write(Report(), colour: false)));

    [Theory]
    [InlineData("")]
    [InlineData("de-DE")]
    public void JsonIsTheApprovedOneInAnyCulture(string culture) => In(culture, () => ApprovedFile.Holds("report.json", JsonReport.Write(Report())));

    [Fact]
    public void NoLineIsLongerThanEightyColumns() =>
        Assert.All(TextReport.Write(Report(), colour: false).Split('\n'), line => Assert.InRange(line.Length, 0, 80));

    [Fact]
    public void ColourTouchesVerdictWordsAlone()
    {
        string plain = TextReport.Write(Report(), colour: false);
        string coloured = TextReport.Write(Report(), colour: true);
        Assert.NotEqual(plain, coloured);
        Assert.Equal(plain, System.Text.RegularExpressions.Regex.Replace(coloured, "\u001b\\[\\d+m", string.Empty));
    }

    private static CheckReport Report()
    {
        Corner corner = new()
        {
            Supply = 25.2,
            LoadDrop = 14.4,
            Ambient = 328.15,
            PinLevel = 4.75,
            PinResistance = 68.75,
            Heat = 0,
            Control = new TransistorCorner(Extreme.Max, Extreme.Min),
            Pass = new TransistorCorner(Extreme.Min, Extreme.Max),
            Sense = Extreme.Min,
            Averaging = Extreme.Max,
            Feed = Extreme.Max,
            OddLeg = "Q2",
            OddPass = new TransistorCorner(Extreme.Match, Extreme.Min),
            OddSense = Extreme.Max,
            OddAveraging = Extreme.Min,
            AssumedCoupling = 0.2,
            AssumedPackageCoupling = 1,
            NeighboursOn = true,
        };
        Finding hot = new()
        {
            Channel = "BENCH",
            Rule = "power",
            Reference = "Q1",
            PartNumber = "TQ-31",
            Manufacturer = "Tarnwood",
            State = ChannelState.On,
            Actual = 0.218,
            Allowed = 0.1596,
            Unit = "W",
            StressRatio = 1.3659,
            Verdict = Verdict.Nonconforming,
            Corner = corner,
            Source = "common practice, no source",
            Cell = "parts.csv!K3",
        };
        IReadOnlyList<Finding> findings =
        [
            new Finding
            {
                Channel = "BENCH", Rule = "drive", State = ChannelState.On, Verdict = Verdict.Nonconforming, Corner = corner, Unit = "A",
                Source = "common practice, no source", Cell = "parts.csv!S3",
            },
            hot,
            hot with { Reference = "Q2" },
            hot with { Rule = "junction", Actual = 473.15, ActualIsAtLeast = true, Allowed = 398.15, Unit = "K", StressRatio = 2.07, Cell = "parts.csv!P3" },
            new Finding
            {
                Rule = "bill", References = ["R1", "R2"], Channels = ["BENCH"], PartNumber = "RK-33", Verdict = Verdict.Nonconforming,
                Source = "the bill and the part table themselves", Cell = "bom.csv!A5", Text = "The quantity is 3, the references are 2.",
            },
            new Finding
            {
                Rule = "pin-current", Pin = "LAMP_A", Channels = ["BENCH", "SHELF"], PartNumber = "P5", Actual = 0.0031, Unit = "A",
                Verdict = Verdict.NotVerified, Source = "common practice, no source", Cell = "pins.csv!A2", Missing = ["Pin current max of P5"],
            },
            hot with
            {
                Rule = "soa", Reference = "Q3", StressRatio = 1.04, Actual = 0.052, Allowed = 0.05, Unit = "A", Verdict = Verdict.Concession, Cell = "parts.csv!Z3",
                Mix = [new MixedLine(["Q1", "Q2", "Q3"], "TQ-31", "Tarnwood", true)],
                Concession = new GrantedConcession("air stays below 35 degC", "A. Wren", new DateOnly(2026, 2, 1), new DateOnly(2026, 8, 31), "serials 0001 to 0120", "concessions.csv!A2"),
            },
            new Finding
            {
                Channel = "BENCH", Rule = "vce", Reference = "Q1", PartNumber = "TQ-31", Manufacturer = "Tarnwood", State = ChannelState.Off,
                Actual = 28, Allowed = 36, Unit = "V", StressRatio = 0.7778, Verdict = Verdict.Conforms, Corner = corner with { OddLeg = null, Heat = 1 },
                Source = "common practice, no source", Cell = "parts.csv!G3",
            },
        ];
        return new CheckReport(
            [
                new BoardReport
                {
                    Board = "lamps/board.xlsx",
                    Verdict = Verdict.Nonconforming,
                    Derating = "workshop",
                    ConcessionsAsOf = new DateOnly(2026, 3, 1),
                    DeratingNote = "A note that every output that uses the table must carry, long enough to need a second line of the report.",
                    Channels =
                    [
                        new ChannelJudgement
                        {
                            Channel = "BENCH", Verdict = Verdict.Nonconforming, Derating = "workshop", LoadCurrent = new LoadCurrentRange(0.0141, 0.0176, 0.0213),
                            CornersSolved = 3842, Findings = findings, Assumed = [], HeatMax = 0.31,
                            TestLimits = new TestLimits(24, new ValueRange(1.14, 1.37), new ValueRange(0.545, 0.649), new ValueRange(5.17, 6.84), new ValueRange(0.0151, 0.0199)),
                            Hottest = [("Q1", 473.15)],
                        },
                        new ChannelJudgement { Channel = "SHELF", Verdict = Verdict.NotVerified, Derating = "ratings", Findings = [], Assumed = [], NotSolved = 1 },
                    ],
                    Findings = findings,
                    Totals = new BoardTotals(0.0141, 0.0213, 0.31, [("LAMP_A", 0.0031)], [("BENCH", "Q1", 473.15)], ["SHELF"]),
                    Rules = ["vce", "power", "junction", "drive", "pin-current", "bill"],
                    RulesNotJudged = ["off"],
                    Assumed = [new AssumedValue("TCR", "RK-33", "200 ppm/K", ["BENCH", "SHELF"]), new AssumedValue("LEDs", "BENCH", "6", ["BENCH"])],
                    Advice = [new Advice("BENCH", "Q1", "A remark on one part, which is never a verdict.")],
                    Cautions = Cautions.All,
                },
            ],
            [new Complaint("lamps/board.xlsx", "Channels", 7, "Supply max", "D7", "twelve", "a voltage", "\"twelve\" is no number.") { Channel = "SHELF" }],
            [new InputFile("lamps/board.xlsx", new string('a', 64))]);
    }

    private static void In(string culture, Action check)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo(culture);
            check();
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }
}
