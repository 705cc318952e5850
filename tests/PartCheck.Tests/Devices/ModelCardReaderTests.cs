using System.Globalization;
using PartCheck.Devices;
using Xunit;

namespace PartCheck.Tests.Devices;

public class ModelCardReaderTests
{
    private const string Typical = """

          .model 9X-117b NPN(
        * written for this test
        +	IS =3.06E-14 NF = 1.01 BF=250	; typical lot
        + VAF=80 IKF=.3856 ISE=2e-14 NE=1.6 $ measured
        + BR=4 NR=1.02 VAR=12 IKR=30m ISC=1p NC=1.8
        + RB=5 IRB=100u RBM=1.5 RE=.1 RC=65.2M NKF=.6
        + XTI=3.5 EG=1.12 XTB=1.5 TREF=25
        + CJE=2pf VJE=.75 TF=0.3ns ITF=.5 MJC=.33 CJC=2p
        )
        """;

    [Fact]
    public void EveryStaticParameterIsRead()
    {
        ModelCard card = Card(Typical);
        BipolarParameters p = card.Parameters;
        Assert.Equal("9X-117b", card.Name);
        Assert.Equal(3.06e-14, p.Is);
        Assert.Equal(1.01, p.Nf);
        Assert.Equal(250, p.Bf);
        Assert.Equal(80, p.Vaf);
        Assert.Equal(0.3856, p.Ikf);
        Assert.Equal(2e-14, p.Ise);
        Assert.Equal(1.6, p.Ne);
        Assert.Equal(4, p.Br);
        Assert.Equal(1.02, p.Nr);
        Assert.Equal(12, p.Var);
        Assert.Equal(0.03, p.Ikr);
        Assert.Equal(1e-12, p.Isc);
        Assert.Equal(1.8, p.Nc);
        Assert.Equal(5, p.Rb);
        Assert.Equal(1e-4, p.Irb);
        Assert.Equal(1.5, p.Rbm);
        Assert.Equal(0.1, p.Re);
        Assert.Equal(0.0652, p.Rc);
        Assert.Equal(0.6, p.Nkf);
        Assert.Equal(3.5, p.Xti);
        Assert.Equal(1.12, p.Eg);
        Assert.Equal(1.5, p.Xtb);
        Assert.Equal(298.15, p.Tnom);
        Assert.Empty(card.Notes);
        Assert.Empty(card.Assumed);
    }

    [Theory]
    [InlineData("0.3ns", 3e-10)]
    [InlineData("45V", 45)]
    [InlineData("65.2M", 0.0652)]
    [InlineData("500M", 0.5)]
    [InlineData("500mA", 0.5)]
    [InlineData("2meg", 2e6)]
    [InlineData("2MEGohm", 2e6)]
    [InlineData("2pf", 2e-12)]
    [InlineData("4f", 4e-15)]
    [InlineData("4U", 4e-6)]
    [InlineData("1.5k", 1500)]
    [InlineData("1g", 1e9)]
    [InlineData("1T", 1e12)]
    [InlineData(".3856", 0.3856)]
    [InlineData("7.", 7)]
    [InlineData("0788", 788)]
    [InlineData("1E-160", 1e-160)]
    [InlineData("1e-3k", 1)]
    [InlineData("+2", 2)]
    public void SuffixesScaleAndUnitsDoNot(string text, double value) =>
        Assert.Equal(value, Card($".model a NPN(IS=1e-14 BF=99 RB={text})").Parameters.Rb);

    [Theory]
    [InlineData("1.0.6")]
    [InlineData("1e")]
    [InlineData("1e-")]
    [InlineData("1D-14")]
    [InlineData("1,5")]
    [InlineData("5µ")]
    [InlineData("5\u00ff")]
    [InlineData("5/")]
    [InlineData("2mil")]
    [InlineData("{rb}")]
    [InlineData("0x10")]
    [InlineData("1e999")]
    [InlineData("NaN")]
    [InlineData("-5")]
    public void WhatIsNotANumberOfItsKindIsAComplaint(string text)
    {
        ModelCardResult result = ModelCardReader.Read($".model a NPN(IS=1e-14 BF=99 RB={text} RC=1)", null);
        Assert.Null(result.Card);
        Assert.Single(result.Errors);
    }

    [Fact]
    public void TheComplaintNamesCardParameterAndText() =>
        Assert.Equal(
            ["VAF=1.0.6 on the card a is no number.", "IS=0 on the card a is not above zero."],
            ModelCardReader.Read(".model a NPN(VAF=1.0.6 IS=0)", null).Errors);

    [Theory]
    [InlineData(".MODEL q NPN (IS=2e-14 BF=120)")]
    [InlineData("  .Model q npn IS=2e-14 BF=120")]
    [InlineData(".model q NPN(IS=2e-14 BF=120")]
    [InlineData(".model q NPN(IS=2e-14\n  +\tBF = 120 \t\n)\n")]
    [InlineData("\r\n.model q NPN(\r\n+ BF=120\r\n*remark\r\n+ IS= 2e-14\r\n)")]
    [InlineData(".model q\n+ NPN\n+ (BF=120, IS=2e-14)\n.end")]
    [InlineData("\uFEFF* title\r.model q NPN(IS=2e-14 ; tail ) BF=7\r+ BF=120) $ BF=8")]
    public void EveryLayoutReadsTheSame(string text)
    {
        ModelCard card = Card(text);
        Assert.Equal("q", card.Name);
        Assert.Equal(2e-14, card.Parameters.Is);
        Assert.Equal(120, card.Parameters.Bf);
    }

    [Fact]
    public void AbsentAndZeroMeanNoLimit()
    {
        foreach (string rest in new[] { "", "VAF=0 VAR=0 IKF=0 IKR=0 IRB=0" })
        {
            BipolarParameters p = Card($".model q NPN(IS=1e-14 BF=99 {rest})").Parameters;
            Assert.Equal(double.PositiveInfinity, p.Vaf);
            Assert.Equal(double.PositiveInfinity, p.Var);
            Assert.Equal(double.PositiveInfinity, p.Ikf);
            Assert.Equal(double.PositiveInfinity, p.Ikr);
            Assert.Equal(double.PositiveInfinity, p.Irb);
            Assert.True(double.IsNaN(p.Rbm));
            Assert.Equal(0, p.Ise);
            Assert.Equal(0, p.Isc);
            Assert.Equal(300.15, p.Tnom);
        }
    }

    [Fact]
    public void AMinimumBaseResistanceOfZeroIsZero()
    {
        // ngspice 39 takes a written RBM=0 as zero, not as RB: RB=100, IKF=0.01, IS=1e-14, BF=100 at 0.8 V collect 25.5273 mA, 16.5800 mA without RBM.
        Assert.Equal(0, Card(".model q NPN(IS=1e-14 BF=100 RB=100 RBM=0)").Parameters.Rbm);
        Assert.Equal(20, Card(".model q NPN(IS=1e-14 BF=100 RB=100 RBM=20)").Parameters.Rbm);
    }

    [Fact]
    public void AbsentIsAndBfAreAssumedAndListed()
    {
        ModelCard card = Card(".model q NPN(VAF=50)");
        Assert.Equal(["IS 1e-16 A", "BF 100"], card.Assumed);
        Assert.Equal(1e-16, card.Parameters.Is);
        Assert.Equal(100, card.Parameters.Bf);
    }

    // Every temperature coefficient of charge and time that ngspice 39 lists for its transistor (showmod).
    [Theory]
    [InlineData("CTC CTE CTS TVJC TVJE TVJS TITF1 TITF2 TTF1 TTF2 TTR1 TTR2 TMJE1 TMJE2 TMJC1 TMJC2 TMJS1 TMJS2")]
    [InlineData("CJE VJE MJE CJC VJC MJC XCJC CJS VJS MJS FC TF XTF VTF ITF PTF TR KF AF TLEVC")]
    public void WhatOnlyTouchesChargeAndTimeIsSkippedSilently(string names)
    {
        ModelCard card = Card($".model q NPN(IS=1e-14 BF=99 {string.Join(' ', names.Split(' ').Select(n => n + "=1m"))})");
        Assert.Empty(card.Notes);
        Assert.Equal(99, card.Parameters.Bf);
    }

    [Fact]
    public void OlderNamesAreRead()
    {
        BipolarParameters p = Card(".model q NPN(IS=1e-14 BF=99 VA=60 VB=9 IK=.2 NK=.7 PE=.7 PC=.6 ME=.3 MC=.3 CCS=1p TNOM=27)").Parameters;
        Assert.Equal(60, p.Vaf);
        Assert.Equal(9, p.Var);
        Assert.Equal(0.2, p.Ikf);
        Assert.Equal(0.7, p.Nkf);
        Assert.Equal(300.15, p.Tnom);
    }

    [Fact]
    public void ForeignNamesAreNotedAndSkipped()
    {
        ModelCard card = Card(".model q NPN(IS=1e-14 BF=99 VCEO=45V ICRATING=500M MFG=Somebody MFG=\"Two Words\" level=1)");
        Assert.Equal(
            [
                "VCEO is not read",
                "ICRATING is not read",
                "MFG is not read",
                "MFG is not read",
                "level is not read",
            ],
            card.Notes);
    }

    [Fact]
    public void TheLastOfTwoCountsAndIsNoted()
    {
        ModelCard card = Card(".model q NPN(IS=1e-14 BF=99 VAF=20 VA=30)");
        Assert.Equal(30, card.Parameters.Vaf);
        Assert.Equal(["VAF stands on the card twice; the last one, 30, counts"], card.Notes);
    }

    [Theory]
    [InlineData("ls=1e-14", "The parameter ls on the card q is not known; IS is close to it.")]
    [InlineData("lKF=.2", "The parameter lKF on the card q is not known; IKF is close to it.")]
    [InlineData("FB=20", "The parameter FB on the card q is not known; BF is close to it.")]
    [InlineData("VAFF=20", "The parameter VAFF on the card q is not known; VAF is close to it.")]
    [InlineData("XTBB=20", "The parameter XTBB on the card q is not known; XTB is close to it.")]
    [InlineData("VAF 20", "\"VAF\" on the card q is no parameter: NAME=value is wanted.")]
    [InlineData("IS=", "\"IS=\" on the card q is no parameter: NAME=value is wanted.")]
    [InlineData("NKF=1.5", "NKF=1.5 on the card q is above 1: no more than 1 is wanted.")]
    [InlineData("TNOM=-300", "TNOM=-300 on the card q is below absolute zero: degC are wanted.")]
    [InlineData("ISE=2.5", "ISE=2.5 on the card q is above 1 A: a multiple of IS, as some programs take it, is not read.")]
    public void ASlipIsAComplaint(string parameter, string error)
    {
        ModelCardResult result = ModelCardReader.Read($".model q NPN(BF=99 {parameter})", null);
        Assert.Null(result.Card);
        Assert.Equal(error, result.Errors[0]);
    }

    [Theory]
    [InlineData("RCO=10")]
    [InlineData("VO=2")]
    [InlineData("GAMMA=1e-9")]
    [InlineData("QCO=1p")]
    [InlineData("TLEV=1")]
    [InlineData("ISS=1e-15")]
    [InlineData("NS=1.2")]
    [InlineData("LEVEL=4")]
    [InlineData("TRB1=1m")]
    [InlineData("TVAF2=1u")]
    [InlineData("T_ABS=27")]
    public void WhatGoesBeyondTheModelIsRefused(string parameter) =>
        Assert.Equal(
            [$"{parameter} on the card q changes the static result beyond the Gummel-Poon model: the card is refused."],
            ModelCardReader.Read($".model q NPN(IS=1e-14 BF=99 {parameter})", null).Errors);

    [Fact]
    public void DefaultsOfWhatGoesBeyondAreNoReasonToRefuse() =>
        Assert.Empty(Card(".model q NPN(IS=1e-14 BF=99 RCO=0 VO=10 GAMMA=10p TLEV=0 ISS=0 NS=1 TRB1=0)").Notes);

    private const string Several = """
        .model one NPN(IS=1e-14 BF=1610)
        .model Two NPN(IS=1e-14 BF=400)
        .model one NPN(IS=1e-14 BF=400)
        .model d D(IS=1e-9)
        .model p PNP(IS=1e-14)
        .subckt dar 1 2 3
        .model inner NPN(IS=1e-14 BF=100)
        .ends
        """;

    [Fact]
    public void TheNameChooses() => Assert.Equal(400, Assert.IsType<ModelCard>(ModelCardReader.Read(Several, "TWO").Card).Parameters.Bf);

    [Theory]
    [InlineData(null, "There are several cards, one, Two, p, inner: name one.")]
    [InlineData("one", "The card one stands in the text more than once, and differs (lines 1, 3): it is not clear which is meant.")]
    [InlineData("three", "There is no card three: the text holds one, Two, d, p, inner.")]
    [InlineData("d", "The card d is of type D: NPN is wanted.")]
    [InlineData("p", "The card p is a PNP transistor: it does not fit a low-side sink.")]
    [InlineData("dar", "dar is a .SUBCKT, not a .MODEL card: the part is more than one transistor.")]
    [InlineData("inner", "The card inner stands inside .SUBCKT dar: the part (a Darlington, one with built-in resistors) is more than one transistor.")]
    public void WhatTheNameCannotChooseIsAComplaint(string? name, string error)
    {
        ModelCardResult result = ModelCardReader.Read(Several, name);
        Assert.Null(result.Card);
        Assert.Equal([error], result.Errors);
    }

    [Theory]
    [InlineData("", "There is no .MODEL card in the text.")]
    [InlineData("IS=1e-14 BF=100", "There is no .MODEL card in the text.")]
    [InlineData(".model q", "The .MODEL line ends before its type: .MODEL name NPN(...) is wanted.")]
    [InlineData(".model q NPN(IS=1e-14\nBF=100)", "The line \"BF=100)\" follows the card q without a leading +.")]
    public void ATextWithoutACardIsAComplaint(string text, string error) =>
        Assert.Equal([error], ModelCardReader.Read(text, null).Errors);

    [Fact]
    public void ADiodeBesideTheOnlyTransistorDoesNotHideIt() =>
        Assert.Equal("q", Card(".model d D(IS=1e-9)\n.model q NPN(IS=1e-14 BF=99)").Name);

    [Fact]
    public void TheSameCardTwiceIsNoted() =>
        Assert.Equal(
            ["card q stands in the text more than once, each time the same"],
            Card(".model q NPN(IS=1e-14 BF=99)\n.MODEL Q npn IS = 1E-14 BF=99").Notes);

    [Fact]
    public void ADecimalCommaCultureChangesNothing()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = new CultureInfo("tr-TR");
            Assert.Equal(3.06e-14, Card(Typical).Parameters.Is);
            Assert.Equal(0.0652, Card(Typical.ToLowerInvariant()).Parameters.Rc);
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    private static ModelCard Card(string text)
    {
        ModelCardResult result = ModelCardReader.Read(text, null);
        Assert.Empty(result.Errors);
        return Assert.IsType<ModelCard>(result.Card);
    }
}
