using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

public class ElementReferenceTests
{
    [Theory]
    [InlineData("Q1.1", "Q1", 1)]
    [InlineData("Q12.10", "Q12", 10)]
    [InlineData("Q1", "Q1", null)]
    [InlineData("Q1.A", "Q1.A", null)]
    [InlineData("Q1.", "Q1.", null)]
    [InlineData("Q1.0", "Q1.0", null)]
    [InlineData("Q1.01", "Q1.01", null)]
    [InlineData("Q1.100", "Q1.100", null)]
    [InlineData(".1", ".1", null)]
    [InlineData("", "", null)]
    public void AnElementIsItsPackageAndANumber(string reference, string package, int? element)
    {
        Assert.Equal(package, ElementReference.PackageOf(reference));
        Assert.Equal(element, ElementReference.ElementOf(reference));
    }
}
