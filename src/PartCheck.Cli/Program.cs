using System.Text;
using PartCheck.Cli;

using CancellationTokenSource cancel = new();
Console.CancelKeyPress += (_, e) =>
{
    e.Cancel = true;
    cancel.Cancel();
};
UTF8Encoding utf8 = new(encoderShouldEmitUTF8Identifier: false);
using StreamWriter output = new(Console.OpenStandardOutput(), utf8) { NewLine = "\n" };
using StreamWriter error = new(Console.OpenStandardError(), utf8) { NewLine = "\n", AutoFlush = true };
bool colour = !Console.IsOutputRedirected && string.IsNullOrEmpty(Environment.GetEnvironmentVariable("NO_COLOR"));
try
{
    return await CommandLine.RunAsync(args, output, error, colour, cancel.Token).ConfigureAwait(false);
}
catch (Exception e) when (e is IOException or UnauthorizedAccessException)
{
    // Standard error itself cannot be written: the exit code is all that is left.
    return 74;
}
