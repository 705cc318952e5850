using PartCheck.Channels;
using Xunit;

namespace PartCheck.Tests.Channels;

public sealed class ChannelBinderTests
{
    private readonly TypedBoard board = new();

    [Fact]
    public void LegsKeepTheOrderOfTheCellsAndADashIsNotSensed()
    {
        board.Row["Pass"] = "Q1, Q3";
        board.Row["Sense"] = "R3, R1";
        board.Row["Averaging"] = "-, R9";
        BoundChannel channel = Assert.Single(Assert.Single(board.Bind()).Readings);
        Assert.Equal(["Q1", "Q3"], channel.Legs.Select(l => l.Pass.Reference));
        Assert.Equal(["R3", "R1"], channel.Legs.Select(l => l.Sense.Reference));
        Assert.Equal([null, "R9"], channel.Legs.Select(l => l.Averaging?.Reference));
        Assert.Equal([false, true], channel.Legs.Select(l => l.Sensed));
    }

    [Theory]
    [InlineData("direct, -", true)]
    [InlineData("-, Direct", false)]
    public void OneLegMayBeSensedDirectly(string averaging, bool first)
    {
        board.Row["Pass"] = "Q1, Q3";
        board.Row["Sense"] = "R3, R1";
        board.Row["Averaging"] = averaging;
        Channel channel = Assert.Single(board.Bind());
        Assert.Empty(board.Complaints);
        Assert.All(Assert.Single(channel.Readings).Legs, l => Assert.Null(l.Averaging));
        Assert.Equal([first, !first], channel.Readings[0].Legs.Select(l => l.Sensed));
        Assert.Equal(["Q1", "Q3", "R3", "R1", "Q2", "R2"], channel.References);
    }

    [Theory]
    [InlineData("direct, direct")]
    [InlineData("direct, R9")]
    public void WhereSeveralLegsAreSensedNoneIsDirect(string averaging)
    {
        board.Row["Pass"] = "Q1, Q3";
        board.Row["Sense"] = "R3, R1";
        board.Row["Averaging"] = averaging;
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Contains("Only a leg that the control senses alone may be joined to it directly", board.Only(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("Sense", "R77", "R77 (sense) is not on the bill.")]
    [InlineData("Sense", "Q3", "Q3 (sense) is a transistor: a resistor is wanted.")]
    [InlineData("Control", "R8", "R8 (control) is a resistor: a transistor is wanted.")]
    [InlineData("Sense", "R10", "R10 (sense) has zero ohm: only averaging may.")]
    [InlineData("Control", "Q1", "Q1 serves as pass and as control.")]
    [InlineData("LED", "D1", "D1 (LED) is not on the bill.")]
    [InlineData("LED", "R3", "R3 (LED) is a resistor: an LED is wanted.")]
    public void ARoleThatTheBillDoesNotServeIsAFault(string column, string reference, string text)
    {
        board.Row[column] = reference;
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(text, Assert.Single(channel.RoleFaults).Text);
        Assert.Empty(channel.Readings);
        Assert.Empty(board.Complaints);
    }

    // The bill may list the package or its elements; the channel names elements.
    [Theory]
    [InlineData("Q1|TQ-2")]
    [InlineData("Q1.1, Q1.2|TQ-2")]
    public void ElementsOfOnePackageServeOnTheirOwn(string line)
    {
        Dual(line);
        board.Row["Pass"] = "Q1.1";
        board.Row["Control"] = "Q1.2";
        Channel channel = Assert.Single(board.Bind());
        Assert.Empty(channel.RoleFaults);
        BoundChannel reading = Assert.Single(channel.Readings);
        Assert.Equal(("Q1.1", "Q1.2"), (reading.Legs[0].Pass.Reference, reading.Control.Reference));
        Assert.Same(reading.Legs[0].PassPart, reading.ControlPart);
        Assert.Empty(reading.Neighbours);
        Assert.DoesNotContain(channel.Assumed, a => a.What == "Element that no channel names");
    }

    [Theory]
    [InlineData("Q1|TQ-2", "Q1", "Q1 (pass) is a package of 2 transistors: name the element, Q1.1 to Q1.2.")]
    [InlineData("Q1.1, Q1.2|TQ-2", "Q1", "Q1 (pass) is a package of 2 transistors: name the element, Q1.1 to Q1.2.")]
    [InlineData("Q1|TQ-2", "Q1.3", "Q1.3 (pass) names element 3, and TQ-2 has 2 in a package (Elements of the part table).")]
    [InlineData("Q1|TQ-30", "Q1.1", "Q1.1 (pass) names element 1, and TQ-30 has 1 in a package (Elements of the part table).")]
    public void WhatIsNoElementOfThePartIsAFault(string line, string pass, string text)
    {
        Dual(line);
        board.Row["Pass"] = pass;
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(text, Assert.Single(channel.RoleFaults).Text);
        Assert.Empty(channel.Readings);
    }

    [Fact]
    public void ElementsInTwoChannelsAreNeighbours()
    {
        Dual("Q1|TQ-2");
        board.Bill.Add("Q4, Q5|TQ-30");
        board.Bill.Add("R4|RK-33");
        board.Bill.Add("R5|RK-4K7");
        board.Row["Pass"] = "Q1.1";
        board.Further.Add([("Channel", "CH2"), ("Pass", "Q4"), ("Control", "Q1.2"), ("Sense", "R4"), ("Feed", "R5")]);
        IReadOnlyList<Channel> channels = board.Bind();
        Assert.All(channels, c => Assert.Empty(c.RoleFaults));
        Assert.Equal(new ElementNeighbour("Q1.1", "Q1.2", "CH2"), Assert.Single(channels[0].Readings[0].Neighbours));
        Assert.Equal(new ElementNeighbour("Q1.2", "Q1.1", "CH1"), Assert.Single(channels[1].Readings[0].Neighbours));
    }

    [Fact]
    public void AnElementThatNoChannelNamesIsAssumedOff()
    {
        Dual("Q1|TQ-2");
        board.Row["Pass"] = "Q1.2";
        Assert.Contains(new Assumption("Element that no channel names", "Q1.1", "off"), Assert.Single(board.Bind()).Assumed);
    }

    private void Dual(string line)
    {
        board.Bill[1] = line;
        board.Parts[0] += "|Elements";
        board.Parts.Add("TQ-2|npn|Tarnwood|||2");
    }

    [Fact]
    public void AnLedIsNoResistor()
    {
        board.Parts[3] = "RK-33|led";
        Assert.Equal("R1 (sense) is an LED: a resistor is wanted.", Assert.Single(Assert.Single(board.Bind()).RoleFaults).Text);
    }

    // Nothing is solved with an LED's row: what is missing of it stays with the LED.
    [Theory]
    [InlineData("D1|LW-3", "part table row of LW-3")]
    [InlineData("D1", "part number of D1")]
    [InlineData("D1|LW-4|Kelbrook", "part table row of LW-4 by Kelbrook")]
    public void AnLedWithoutItsRowLeavesTheChannelToBeJudged(string line, string missing)
    {
        board.Row["LED"] = "D1";
        board.Bill.Add(line);
        board.Parts.Add("LW-4|led|Tarnwood");
        Channel channel = Assert.Single(board.Bind());
        Assert.Empty(channel.Missing);
        Assert.Equal(missing, ((PartCheck.Parts.LedPart)Assert.Single(Assert.Single(channel.Readings).Leds).Part).Missing);
    }

    [Fact]
    public void ZeroOhmMayAverage()
    {
        board.Row["Averaging"] = "R10";
        Assert.Single(Assert.Single(board.Bind()).Readings);
    }

    [Fact]
    public void ALineThatIsNotFittedIsAFaultWithItsMark()
    {
        board.Bill[3] = "R1, R3|RK-33||no";
        RoleFault fault = Assert.Single(Assert.Single(board.Bind()).RoleFaults);
        Assert.Equal(("R1 (sense) is not fitted: the bill says \"no\".", "b.csv!D4"), (fault.Text, fault.Cell));
    }

    [Fact]
    public void ARefusedKindIsAFaultWithItsReason()
    {
        board.Parts[1] = "TQ-31|pnp";
        Assert.Equal(
            "TQ-31 is refused as pass: a PNP transistor does not fit a low-side sink.", Assert.Single(Assert.Single(board.Bind()).RoleFaults).Text);
    }

    [Theory]
    [InlineData("R1, R3|RK-99", "part table row of RK-99")]
    [InlineData("R1, R3||Kelbrook", "part number of R1")]
    [InlineData("R1, R3|TQ-31|Otherone", "part table row of TQ-31 by Otherone")]
    public void WhatThePartTableDoesNotHoldIsMissing(string line, string missing)
    {
        board.Bill[3] = line;
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(missing, Assert.Single(channel.Missing));
        Assert.Empty(channel.Readings);
    }

    [Fact]
    public void AMakerOnTheBillKeepsItsRowsAlone()
    {
        board.Parts.Add("TQ-31|npn|Kelbrook");
        Assert.Equal(2, Assert.Single(board.Bind()).Readings.Count);
        board.Bill[1] = "Q1, Q3|TQ-31|KELBROOK";
        Assert.Equal("Kelbrook", Assert.Single(Assert.Single(board.Bind()).Readings).Legs[0].PassPart.Manufacturer);
    }

    [Fact]
    public void OneLineInSeveralRolesTakesOneRowAtATime()
    {
        board.Parts.Add("TQ-31|npn|Kelbrook");
        board.Row["Control"] = "Q3";
        IReadOnlyList<BoundChannel> readings = Assert.Single(board.Bind()).Readings;
        Assert.Equal(2, readings.Count);
        Assert.All(readings, r => Assert.Same(r.Legs[0].PassPart, r.ControlPart));
    }

    [Fact]
    public void MountingKeepsItsRowsAndBlankTakesAllAssumed()
    {
        board.Parts[1] = "TQ-31|npn|Tarnwood|FR4";
        board.Parts.Add("TQ-31|npn|Tarnwood|1 cm2");
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(2, channel.Readings.Count);
        Assert.Contains(new Assumption("Mounting", "TQ-31", "the worst of its rows"), channel.Assumed);

        board.Row["Mounting"] = "fr4";
        channel = Assert.Single(board.Bind());
        Assert.Equal("FR4", Assert.Single(channel.Readings).Legs[0].PassPart.Mounting);
        Assert.Empty(channel.Assumed);

        board.Row["Mounting"] = "ceramic";
        Assert.Equal("part table row of TQ-31 on ceramic", Assert.Single(Assert.Single(board.Bind()).Missing));
    }

    // 16 x 16 = 256 readings are solved, 17 x 16 = 272 are too many.
    [Theory]
    [InlineData(16, 256)]
    [InlineData(17, 0)]
    public void MoreThan256ReadingsAreAComplaint(int makers, int readings)
    {
        board.Parts.AddRange(Enumerable.Range(1, makers - 1).Select(i => $"TQ-31|npn|Maker {i}"));
        board.Parts.AddRange(Enumerable.Range(1, 15).Select(i => $"TQ-30|npn|Maker {i}"));
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(readings, channel.Readings.Count);
        if (readings == 0)
        {
            Assert.Equal("CH1", Assert.Single(board.Complaints).Channel);
            Assert.Contains("272 combinations", board.Only(), StringComparison.Ordinal);
            Assert.Equal(["manufacturers on the bill, or fewer alternates"], channel.Missing);
        }
    }

    // Two parts on each of two lines: four mixes, the bill's own parts first.
    [Fact]
    public void EveryMixOfAlternatesOverTheLinesIsAReadingAndNamesItself()
    {
        GiveAlternates("OX-9", "OX-8; ox-8, TQ-30");
        IReadOnlyList<BoundChannel> readings = Assert.Single(board.Bind()).Readings;
        Assert.Equal(
            ["TQ-31 TQ-30", "OX-9 TQ-30", "TQ-31 OX-8", "OX-9 OX-8"], readings.Select(r => $"{r.Legs[0].PassPart.PartNumber} {r.ControlPart.PartNumber}"));
        Assert.Equal(
            ["Q1 TQ-31 False, Q2 TQ-30 False", "Q1 OX-9 True, Q2 TQ-30 False", "Q1 TQ-31 False, Q2 OX-8 True", "Q1 OX-9 True, Q2 OX-8 True"],
            readings.Select(r => string.Join(", ", r.Mix.Select(m => $"{string.Join('+', m.References)} {m.PartNumber} {m.Alternate}"))));
    }

    [Fact]
    public void AlternatesOfAnyManufacturerCountAndAChannelWithoutAChoiceHasNoMix()
    {
        Assert.Empty(Assert.Single(Assert.Single(board.Bind()).Readings).Mix);
        GiveAlternates("OX-9", string.Empty);
        board.Bill[1] = "Q1, Q3|TQ-31|Tarnwood||||OX-9";
        board.Parts.Add("OX-9|npn|Tarnwood");
        Assert.Equal([null, "Oxmoor", "Tarnwood"], Assert.Single(board.Bind()).Readings.Select(r => r.Mix[0].Alternate ? r.Mix[0].Manufacturer : null));
    }

    [Fact]
    public void AnAlternateThatCannotPlayTheRoleIsAFaultOfItsOwnAndTheRestIsBound()
    {
        GiveAlternates("RK-33", string.Empty);
        Channel channel = Assert.Single(board.Bind());
        Assert.Single(channel.Readings);
        RoleFault fault = Assert.Single(channel.RoleFaults);
        Assert.Equal(("Alternate RK-33: Q1 (pass) is a resistor: a transistor is wanted.", true), (fault.Text, fault.OfAlternate));
        Assert.Null(fault.Missing);
    }

    [Fact]
    public void AnAlternateWithoutARowForTheMountingIsNotVerified()
    {
        GiveAlternates("OX-9", string.Empty);
        board.Parts[^2] = "OX-9|npn|Oxmoor|FR4";
        board.Row["Mounting"] = "ceramic";
        Channel channel = Assert.Single(board.Bind());
        Assert.Single(channel.Readings);
        Assert.Equal("part table row of OX-9 on ceramic", Assert.Single(channel.RoleFaults).Missing);
    }

    [Fact]
    public void TheBillsChannelAndRoleStandForTheReferenceColumns()
    {
        GiveRoles();
        BoundChannel channel = Assert.Single(Assert.Single(board.Bind()).Readings);
        Assert.Empty(board.Complaints);
        Assert.Equal(["Q1", "Q3"], channel.Legs.Select(l => l.Pass.Reference));
        Assert.Equal(("Q2", "R2", "R10"), (channel.Control.Reference, channel.Feed.Reference, channel.PullDown?.Reference));
        Assert.Equal(["R8", "R9"], channel.Legs.Select(l => l.Averaging?.Reference));
    }

    [Fact]
    public void ARoleOnTheBillThatIsNotKnownIsAComplaint()
    {
        GiveRoles();
        board.Bill[5] = "R8, R9|RK-100|||CH1|average";
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Contains(board.Complaints, c => c.Text.Contains("the role \"average\" in this channel, which is not known (b.csv!A6)", StringComparison.Ordinal));
    }

    [Fact]
    public void ColumnsAndBillThatContradictAreTold()
    {
        GiveRoles();
        board.Row["Feed"] = "R3";
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Contains("The channel's feed is R3 here and R2 by the bill's column Role.", board.Only(), StringComparison.Ordinal);
    }

    private void GiveAlternates(string pass, string control)
    {
        board.Bill[0] += "|Alternates";
        board.Bill[1] = "Q1, Q3|TQ-31|||||" + pass;
        board.Bill[2] = "Q2|TQ-30|||||" + control;
        board.Parts.Add("OX-9|npn|Oxmoor");
        board.Parts.Add("OX-8|npn|Oxmoor");
    }

    private void GiveRoles()
    {
        foreach (string column in (ReadOnlySpan<string>)["Pass", "Sense", "Control", "Feed"])
        {
            board.Row.Remove(column);
        }

        board.Parts[6] = "RK-0|resistor|||10k";
        board.Bill.RemoveRange(1, board.Bill.Count - 1);
        board.Bill.AddRange(
        [
            "Q1, Q3|TQ-31|||CH1|pass", "Q2|TQ-30|||ch1|Control", "R1, R3|RK-33|||CH1|sense", "R2|RK-4K7|||CH1|feed",
            "R8, R9|RK-100|||CH1|averaging", "R10|RK-0|||CH1|pull-down",
        ]);
    }
}
