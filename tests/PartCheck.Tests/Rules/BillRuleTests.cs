using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Rules;

public class BillRuleTests : ExactRuleTests
{
    private static readonly PartTable Table = new([SampleChannel.Transistor(), SampleChannel.Transistor("TQ-2") with { Elements = 2 }, SampleChannel.Resistor(33)]);

    private static readonly BillLine Senses = new()
    {
        References = ["R1", "R2"],
        PartNumber = "RK-33",
        Quantity = 2,
        Resistance = Resistance.FromOhms(33),
        Cell = "bom.csv!A2",
    };

    public override string Id => BillRule.Id;

    protected override Finding Agreeing() => Assert.Single(Judge(Senses));

    protected override Finding Disagreeing() => Assert.Single(Judge(Senses with { Quantity = 3 }));

    protected override Finding WithoutTheRow() => Assert.Single(Judge(Senses with { PartNumber = "RK-99" }));

    protected override IReadOnlyList<Finding> NotAsked() => Judge(Senses with { References = ["C7"], Quantity = 9, PartNumber = null });

    [Fact]
    public void ALineThatAgreesConformsAndNamesItsChannels()
    {
        Finding finding = Assert.Single(Judge(Senses));
        Assert.Equal(Verdict.Conforms, finding.Verdict);
        Assert.Equal(["CH1"], finding.Channels);
        Assert.Null(finding.StressRatio);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    public void AQuantityThatDisagreesIsNonconforming(double quantity) =>
        Assert.Equal(Verdict.Nonconforming, Assert.Single(Judge(Senses with { Quantity = quantity })).Verdict);

    [Fact]
    public void ABlankQuantityContradictsNothing() =>
        Assert.Equal(Verdict.Conforms, Assert.Single(Judge(Senses with { Quantity = null })).Verdict);

    // Two transistors in one package are one component to buy and place.
    [Theory]
    [InlineData("Q1.1 Q1.2", 1, Verdict.Conforms)]
    [InlineData("Q1.1 Q1.2", 2, Verdict.Nonconforming)]
    [InlineData("Q1", 1, Verdict.Conforms)]
    [InlineData("Q1 Q5", 2, Verdict.Conforms)]
    [InlineData("Q1", 2, Verdict.Nonconforming)]
    public void ElementsOfOnePackageAreOneComponent(string references, double quantity, Verdict verdict) =>
        Assert.Equal(verdict, Assert.Single(Judge(Dual(references) with { Quantity = quantity })).Verdict);

    [Theory]
    [InlineData("Q1.1 Q1.3", "Q1.3 names an element that the part does not have, the part table's Elements are 2.")]
    [InlineData("Q1.1 Q1", "Q1 stands there as a whole and by elements.")]
    public void ElementsThatThePartDoesNotHaveAreNonconforming(string references, string text) =>
        Assert.Equal((Verdict.Nonconforming, text), Assert.Single(Judge(Dual(references)).Select(f => (f.Verdict, f.Text!))));

    [Fact]
    public void AnElementOfASingleTransistorIsNonconforming() => Assert.Equal(
        "Q1.1 names an element that the part does not have, the part table's Elements are 1.", Assert.Single(Judge(Dual("Q1.1") with { PartNumber = "TQ-31" })).Text);

    // A package is bought once: on two lines it would be bought twice.
    [Fact]
    public void ElementsOfOnePackageStandOnOneLine()
    {
        BillLine other = Dual("Q1.2") with { Cell = "bom.csv!A4" };
        IReadOnlyList<Finding> findings = BillRule.Judge(new Bill("bom.csv", [Dual("Q1.1"), other]), Table, [Channel()]);
        Assert.Equal(["Q1 stands on another line, too (bom.csv!A4).", "Q1 stands on another line, too (bom.csv!A3)."], findings.Select(f => f.Text));
    }

    [Theory]
    [InlineData("SOT-23", Verdict.Conforms)]
    [InlineData("sot23", Verdict.Conforms)]
    [InlineData("SOT-23-5", Verdict.Nonconforming)]
    [InlineData("TO-92", Verdict.Nonconforming)]
    public void ThePackageAgreesWithThePartTable(string package, Verdict verdict) => Assert.Equal(
        verdict, Assert.Single(Judge(new BillLine { References = ["Q1.1"], PartNumber = "TQ-2", Package = package, Cell = "bom.csv!A3" })).Verdict);

    [Theory]
    [InlineData(33.0, Verdict.Conforms)]
    [InlineData(33.2, Verdict.Nonconforming)]
    public void TheValueAgreesWithThePartTable(double ohms, Verdict verdict) =>
        Assert.Equal(verdict, Assert.Single(Judge(Senses with { Resistance = Resistance.FromOhms(ohms) })).Verdict);

    [Fact]
    public void APartThatTheTableDoesNotHaveIsNotVerified()
    {
        Finding finding = Assert.Single(Judge(Senses with { PartNumber = "RK-99" }));
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["part table row of RK-99"], finding.Missing);
    }

    [Fact]
    public void AnAlternateThatTheTableDoesNotHaveIsNotVerified()
    {
        Finding finding = Assert.Single(Judge(Senses with { Alternates = ["RK-33", "RK-98", "RK-99"] }));
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["part table row of RK-98", "part table row of RK-99"], finding.Missing);
    }

    [Fact]
    public void AnAlternateInAnotherPackageOrOfAnotherValueIsNonconforming()
    {
        BillLine line = new() { References = ["R1"], PartNumber = "RK-33", Resistance = Resistance.FromOhms(33), Package = "0603", Alternates = ["TQ-31", "RK-47"], Cell = "bom.csv!A2" };
        PartTable table = new([SampleChannel.Transistor(), SampleChannel.Resistor(33) with { Package = "0603" }, SampleChannel.Resistor(47) with { Package = "0603" }]);
        Finding finding = Assert.Single(BillRule.Judge(new Bill("bom.csv", [line]), table, [Channel()]));
        Assert.Equal(Verdict.Nonconforming, finding.Verdict);
        Assert.Equal("The bill's package is 0603, that of the alternate TQ-31 SOT-23; the bill's value is 33 ohm, that of the alternate RK-47 47 ohm.", finding.Text);
    }

    [Fact]
    public void AnAlternateThatLacksDataInItsRoleIsNotVerified()
    {
        RoleFault fault = new(Role.Feed, "R9", "Alternate RK-1: its row is not for this mounting.", "bom.csv!A9") { OfAlternate = true, Missing = "part table row of RK-1 on FR4" };
        Finding finding = Assert.Single(BillRule.Judge(new Bill("bom.csv", []), Table, [Channel() with { RoleFaults = [fault] }]));
        Assert.Equal(Verdict.NotVerified, finding.Verdict);
        Assert.Equal(["part table row of RK-1 on FR4"], finding.Missing);
    }

    [Fact]
    public void ARoleThatTheBillDoesNotServeIsAFindingOfItsChannel()
    {
        RoleFault fault = new(Role.Feed, "R9", "R9 is not on the bill.", "channels.csv!M2");
        Finding finding = Assert.Single(BillRule.Judge(new Bill("bom.csv", []), Table, [Channel() with { RoleFaults = [fault] }]));
        Assert.Equal(("CH1", "R9", Verdict.Nonconforming, "channels.csv!M2"), (finding.Channel, finding.Reference, finding.Verdict, finding.Cell));
    }

    private static BillLine Dual(string references) => new() { References = references.Split(' '), PartNumber = "TQ-2", Cell = "bom.csv!A3" };

    private static IReadOnlyList<Finding> Judge(BillLine line) => BillRule.Judge(new Bill("bom.csv", [line]), Table, [Channel()]);

    private static Channel Channel() => new()
    {
        Name = "CH1",
        Cell = "channels.csv!A2",
        Readings = [],
        Missing = [],
        RoleFaults = [],
        Assumed = [],
        References = ["Q1.1", "Q1.2", "R1", "R2", "R9"],
    };
}
