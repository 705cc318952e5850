using System.Runtime.CompilerServices;
using Xunit;

namespace PartCheck.Tests.Golden;

/// <summary>Files of this folder, approved by hand. A mismatch writes what came beside and fails; it never rewrites.</summary>
internal static class ApprovedFile
{
    public static void Holds(string name, string received, [CallerFilePath] string caller = "")
    {
        string golden = Path.Combine(Path.GetDirectoryName(caller)!, "..", "Golden", name);
        string approved = File.Exists(golden) ? File.ReadAllText(golden) : string.Empty;
        if (approved != received)
        {
            File.WriteAllText(Path.ChangeExtension(golden, ".received" + Path.GetExtension(name)), received);
        }

        Assert.Equal(approved, received);
    }
}
