using System.Runtime.CompilerServices;

namespace FemCore2D.Reference;

public class ReadmeTests
{
    /// <summary>The README shows the coaxial example as it stands, so its code is what the check script runs.</summary>
    [Fact]
    public void TheReadmeShowsTheCoaxialExample()
    {
        string root = Path.GetFullPath(Path.Combine(Path.GetDirectoryName(ThisFile())!, "..", ".."));
        string example = File.ReadAllText(Path.Combine(root, "docs", "examples", "coaxial.cs"));
        string shown = example[example.IndexOf("using FemCore2D.Drawing;", StringComparison.Ordinal)..].TrimEnd();
        Assert.Contains(shown, File.ReadAllText(Path.Combine(root, "README.md")), StringComparison.Ordinal);
    }

    private static string ThisFile([CallerFilePath] string path = "") => path;
}
