namespace PartCheck.Cli.Tests;

/// <summary>A small conforming board in a folder of its own, and the command run on it as a user would.</summary>
internal sealed class BoardFolder : IDisposable
{
    public const string Bill = """
        References,Part number,Quantity,Value,Package,Manufacturer
        Q1,TQ-31,1,,SOT-23,Tarnwood
        Q2,TQ-30,1,,SOT-23,Tarnwood
        R1,RK-33,1,33,0603,Kelbrook
        R2,RK-4K7,1,4k7,0603,Kelbrook
        J1,CON-2,1,,,
        """;

    public const string Channels = """
        Channel,Supply min [V],Supply max [V],Load drop min [V],Load drop max [V],LEDs,Current min [mA],Current max [mA],Logic,Ambient min [degC],Ambient max [degC],Pass,Sense,Control,Feed
        CH1,11.4,12.6,8.5,9.5,3,12,28,P5,0,45,Q1,R1,Q2,R2
        """;

    public const string Parts = """
        Part number,Kind,Manufacturer,Package,VCEO [V],VCBO [V],IC [mA],Power [mW],RthJA [K/W],Coupling [K/W],Tj max [degC],hFE points,hFE cold min,hFE cold at [mA],hFE cold temperature [degC],VBE min [V],VBE max [V],VBE at [mA],VCEsat max [V],VCEsat at [mA],Resistance,Tolerance,TCR [ppm/K],Working voltage max [V]
        TQ-31,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,1mA:100..300; 10mA:120..360; 50mA:80..,60,10,-40,0.63,0.70,10,0.3,50,,,,
        TQ-30,npn,Tarnwood,SOT-23,45,50,200,350,300,20,150,0.1mA:90..; 1mA:100..300; 10mA:120..360,60,10,-40,0.56,0.63,1,0.3,50,,,,
        RK-33,resistor,Kelbrook,0603,,,,100,,,155,,,,,,,,,,33,1%,100,75
        RK-4K7,resistor,Kelbrook,0603,,,,100,,,155,,,,,,,,,,4k7,1%,100,75
        """;

    public const string Pins = """
        Name,Output,Supply min [V],Supply max [V],High min [V],High current [mA],Pin current max [mA]
        P5,cmos,4.75,5.25,4.25,8,20
        """;

    public BoardFolder(string? bill = Bill, string? channels = Channels, string? parts = Parts, string? pins = Pins)
    {
        Folder = Directory.CreateTempSubdirectory("partcheck-test-").FullName;
        Write("bom.csv", bill);
        Write("channels.csv", channels);
        Write("parts.csv", parts);
        Write("pins.csv", pins);
    }

    public string Folder { get; }

    public string At(string file) => Path.Combine(Folder, file);

    public void Write(string file, string? text)
    {
        if (text is not null)
        {
            File.WriteAllText(At(file), text);
        }
    }

    /// <summary>Runs <c>partcheck check</c> on the folder.</summary>
    public Task<Run> Check(params string[] more) => Run.Of(["check", Folder, .. more]);

    public void Dispose() => Directory.Delete(Folder, recursive: true);
}

/// <summary>What a command printed and ended with.</summary>
internal sealed record Run(int Code, string Output, string Error)
{
    public static async Task<Run> Of(params string[] args)
    {
        using StringWriter output = new() { NewLine = "\n" };
        using StringWriter error = new() { NewLine = "\n" };
        int code = await CommandLine.RunAsync(args, output, error, false, CancellationToken.None);
        return new Run(code, output.ToString(), error.ToString());
    }

    /// <summary>The output without its line breaks and indents, so that wrapped sentences can be looked for whole.</summary>
    public string Flat => string.Join(' ', Output.Split((char[])[' ', '\n'], StringSplitOptions.RemoveEmptyEntries));
}
