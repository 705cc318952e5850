using System.Diagnostics;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>The vectors are written so that every operation rounds alike with any hardware, and with none.</summary>
public class HardwareTests
{
    [Fact]
    public async Task TheReportIsTheSameWithVectorHardwareSwitchedOff()
    {
        using BoardFolder board = new();
        (int code, string text) = await Child(board.Folder, ("DOTNET_EnableHWIntrinsic", "0"));
        (int plainCode, string plain) = await Child(board.Folder);
        (int narrowCode, string narrow) = await Child(board.Folder, ("DOTNET_EnableAVX512", "0"), ("DOTNET_EnableAVX512F", "0"));
        Assert.Equal(0, plainCode);
        Assert.Contains("conforms", plain, StringComparison.Ordinal);
        Assert.Equal((plainCode, plain), (code, text));
        Assert.Equal((plainCode, plain), (narrowCode, narrow));
    }

    private static async Task<(int Code, string Text)> Child(string folder, params (string Name, string Value)[] environment)
    {
        string program = Path.Combine(AppContext.BaseDirectory, "partcheck-cli.dll");
        ProcessStartInfo start = new("dotnet") { RedirectStandardOutput = true, UseShellExecute = false, WorkingDirectory = folder };
        foreach (string argument in (string[])["exec", program, "check", folder, "--format", "json"])
        {
            start.ArgumentList.Add(argument);
        }

        foreach ((string name, string value) in environment)
        {
            start.Environment[name] = value;
        }

        using Process process = Process.Start(start)!;
        string text = await process.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken);
        await process.WaitForExitAsync(TestContext.Current.CancellationToken);
        return (process.ExitCode, text);
    }
}
