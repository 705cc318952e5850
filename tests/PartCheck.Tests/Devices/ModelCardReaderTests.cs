using PartCheck.Devices;
using Xunit;

namespace PartCheck.Tests.Devices;

public class ModelCardReaderTests
{
    [Fact]
    public void ReadsACardAsItIsMetInTheWild()
    {
        ModelCard card = Card("""

            * a comment
             .model 2tq-31 npn(IS =3.06E-14 bf=250 ; tail
            +	VA = 80V IK=200m
            + ISE=.3856p NE=1.5 RC=65.2M CJE=2pf TF=0.3ns
            * another
            + mfg=Tarnwood ICRATING=500M level=1 $ tail
            )
            """);
        BipolarParameters p = card.Parameters;
        Assert.Equal("2tq-31", card.Name);
        Assert.Equal(3.06, p.Is * 1e14, 9);
        Assert.Equal(250, p.Bf);
        Assert.Equal(80, p.Vaf);
        Assert.Equal(0.2, p.Ikf, 12);
        Assert.Equal(0.3856, p.Ise * 1e12, 9);
        Assert.Equal(0.0652, p.Rc, 12);
        Assert.Equal(300.15, p.Tnom, 9);
        Assert.True(double.IsPositiveInfinity(p.Var));
        Assert.True(double.IsPositiveInfinity(p.Ikr));
        Assert.Equal(3, card.Notes.Count);
        Assert.Empty(card.Assumed);
    }

    [Theory]
    [InlineData(".MODEL a NPN IS=1e-14 BF=100")]
    [InlineData(".model a NPN (IS=1e-14 BF=100)")]
    [InlineData(".Model a npn(IS=1e-14 BF=100")]
    [InlineData(".model a NPN IS = 1e-14\n+BF = 100")]
    public void ParenthesesAreNeitherNeededNorInTheWay(string text)
    {
        BipolarParameters p = Card(text).Parameters;
        Assert.Equal((1e-14, 100.0), (p.Is, p.Bf));
    }

    [Fact]
    public void TheLastOfTwoCountsAndIsSaid()
    {
        ModelCard card = Card(".model a NPN(IS=1e-14 BF=100 BF=200)");
        Assert.Equal(200, card.Parameters.Bf);
        Assert.Contains("BF stands on the card twice; the last one counts", card.Notes);
    }

    [Fact]
    public void AbsentSaturationCurrentAndGainAreAssumedAndListed()
    {
        ModelCard card = Card(".model a NPN(VAF=80)");
        Assert.Equal(["IS 1e-16 A", "BF 100"], card.Assumed);
    }

    [Theory]
    [InlineData(".model a PNP(IS=1e-14)", "does not fit a low-side sink")]
    [InlineData(".model a D(IS=1e-14)", "NPN is wanted")]
    [InlineData(".subckt a 1 2 3\n.model b NPN(IS=1e-14)\n.ends", "inside a .SUBCKT")]
    [InlineData(".model a NPN(ls=1e-14 BF=100)", "IS is close to it")]
    [InlineData(".model a NPN(IS=1e-14 VAF=1.06.5)", "is no number")]
    [InlineData(".model a NPN(IS=1e-14 BF=100\u0007)", "is no number")]
    [InlineData(".model a NPN(IS=1e-14 BF=100 RCO=5)", "beyond the Gummel-Poon model")]
    [InlineData(".model a NPN(IS=-1e-14)", "above zero is wanted")]
    [InlineData(".model a NPN(IS=1e-14 BF)", "is no parameter")]
    [InlineData("nothing", "no .MODEL card")]
    [InlineData(".model a NPN(IS=1e-14)\n.model b NPN(IS=2e-14)", "several cards, a, b: name one")]
    public void RefusesWithTheReason(string text, string reason)
    {
        ModelCardResult result = ModelCardReader.Read(text, null);
        Assert.Null(result.Card);
        Assert.Contains(reason, Assert.Single(result.Errors), StringComparison.Ordinal);
    }

    [Fact]
    public void OneOfSeveralCardsIsTakenByName()
    {
        ModelCardResult result = ModelCardReader.Read(".model a NPN(IS=1e-14)\n.model b NPN(IS=2e-14)", "B");
        Assert.Equal(2e-14, result.Card!.Parameters.Is);
        Assert.Contains("There is no card c", ModelCardReader.Read(".model a NPN(IS=1e-14)", "c").Errors[0], StringComparison.Ordinal);
    }

    private static ModelCard Card(string text)
    {
        ModelCardResult result = ModelCardReader.Read(text, null);
        Assert.True(result.Card is not null, string.Join(" ", result.Errors));
        return result.Card;
    }
}
