using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.Architecture;

/// <summary>Rooms look left: the table of who may see whom is the architecture diagram, and the compiled code is held to it.</summary>
public class RoomTests
{
    /// <summary>Each room with the rooms it may see.</summary>
    private static readonly Dictionary<string, string[]> MaySee = new(StringComparer.Ordinal)
    {
        ["Quantities"] = [],
        ["Devices"] = ["Quantities"],
        ["Sheets"] = ["Quantities"],
        ["Bills"] = ["Quantities", "Sheets"],
        ["Parts"] = ["Quantities", "Devices", "Sheets"],
        ["Channels"] = ["Quantities", "Sheets", "Bills", "Parts"],
        ["OperatingPoints"] = ["Quantities", "Devices", "Parts", "Channels"],
        ["Derating"] = ["Quantities", "Sheets"],
        ["Rules"] = ["Quantities", "Bills", "Parts", "Channels", "OperatingPoints", "Derating"],
        ["Concessions"] = ["Quantities", "Sheets", "Bills", "Rules"],
        ["Workings"] = ["Quantities", "Devices", "Parts", "Channels", "OperatingPoints", "Derating", "Rules"],
        ["Reports"] = ["Quantities", "Sheets", "Bills", "Parts", "Channels", "OperatingPoints", "Rules", "Workings"],
    };

    [Fact]
    public void NoRoomLooksRight()
    {
        List<string> wrong = [];
        foreach (Type type in typeof(Rule).Assembly.GetTypes().Where(t => RoomOf(t) is not null))
        {
            string room = RoomOf(type)!;
            foreach (Type seen in CompiledReferences.Of(type))
            {
                if (seen.Assembly == type.Assembly && RoomOf(seen) is { } other && other != room && !MaySee[room].Contains(other))
                {
                    wrong.Add($"{type.FullName} ({room}) sees {seen.FullName} ({other})");
                }
            }
        }

        Assert.True(wrong.Count == 0, string.Join("\n", wrong.Distinct().Order(StringComparer.Ordinal)));
    }

    [Fact]
    public void EveryRoomIsInTheTableAndOnlyTheRunStandsOutside()
    {
        IEnumerable<string?> rooms = typeof(Rule).Assembly.GetTypes()
            .Where(t => t.Namespace?.StartsWith("PartCheck.", StringComparison.Ordinal) == true).Select(RoomOf).Distinct();
        Assert.Equal(MaySee.Keys.Order(StringComparer.Ordinal), rooms.Order(StringComparer.Ordinal));
        Assert.All(
            typeof(Rule).Assembly.GetTypes().Where(t => t.Namespace == "PartCheck" && t.DeclaringType is null && !t.Name.Contains('<', StringComparison.Ordinal)),
            t => Assert.Contains(t.Name, (string[])["CheckRun", "CheckRequest"]));
    }

    // The reader of compiled code is itself held to a case: a body that calls into another type names it.
    [Fact]
    public void BodiesAreRead() => Assert.Contains(typeof(Stress), CompiledReferences.Of(typeof(VceRule)));

    private static string? RoomOf(Type type) =>
        type.Namespace is { } name && name.StartsWith("PartCheck.", StringComparison.Ordinal) ? name.Split('.')[1] : null;
}
