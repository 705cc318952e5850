using System.Globalization;
using Xunit;

namespace PartCheck.Tests.Architecture;

/// <summary>The whole suite also runs under a culture with a decimal comma: this shows that such a run is really one.</summary>
public class CultureTests
{
    [Fact]
    public void ARunUnderADecimalCommaCultureWritesOne()
    {
        string asked = Environment.GetEnvironmentVariable("LC_ALL") ?? string.Empty;
        Assert.SkipUnless(asked.StartsWith("de_DE", StringComparison.Ordinal), "not a decimal-comma run; one is: LC_ALL=de_DE.UTF-8 dotnet test");
        Assert.Equal("de-DE", CultureInfo.CurrentCulture.Name);
#pragma warning disable CA1305 // The current culture is what this test is about.
        Assert.Equal("0,5", 0.5.ToString());
#pragma warning restore CA1305
    }
}
