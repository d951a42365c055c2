using System.Xml.Linq;

namespace LiveWave.Pipeline.Tests;

/// <summary>Who may see whom: the column of that name in DEVELOPERS.md, held against the project files.</summary>
public sealed class ProjectsSeeOnlyWhatTheyMay
{
    private static readonly Dictionary<string, string[]> MaySee = new()
    {
        ["LiveWave.Abstractions"] = [],
        ["LiveWave.Dsp"] = ["LiveWave.Abstractions"],
        ["LiveWave.Pipeline"] = ["LiveWave.Abstractions", "LiveWave.Dsp"],
        ["LiveWave.Recordings"] = ["LiveWave.Abstractions"],
        ["LiveWave.Display"] = ["LiveWave.Abstractions", "LiveWave.Pipeline"],
        ["LiveWave.App"] = ["LiveWave.Abstractions", "LiveWave.Display", "LiveWave.Dsp", "LiveWave.Pipeline", "LiveWave.Recordings"],
    };

    [Fact]
    public void Every_project_refers_to_what_it_may_see_and_to_nothing_else()
    {
        var projects = Directory.GetFiles(Path.Combine(RepositoryRoot(), "src"), "*.csproj", SearchOption.AllDirectories);

        Assert.Equal(MaySee.Keys.Order(), projects.Select(Path.GetFileNameWithoutExtension).Order());
        Assert.All(projects, project =>
        {
            var seen = XDocument.Load(project).Descendants("ProjectReference")
                .Where(reference => (string?)reference.Attribute("ReferenceOutputAssembly") != "false")
                .Select(reference => Path.GetFileNameWithoutExtension(((string)reference.Attribute("Include")!).Replace('\\', '/')));
            Assert.Subset(MaySee[Path.GetFileNameWithoutExtension(project)].ToHashSet(), seen.ToHashSet());
        });
    }

    [Fact]
    public void Abstractions_and_Dsp_bring_no_package_with_them()
    {
        foreach (var name in (string[])["LiveWave.Abstractions", "LiveWave.Dsp"])
        {
            var project = XDocument.Load(Path.Combine(RepositoryRoot(), "src", name, name + ".csproj"));

            Assert.Empty(project.Descendants("PackageReference"));
        }
    }

    private static string RepositoryRoot()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder!.FullName, "LiveWave.sln"))) folder = folder.Parent;
        return folder.FullName;
    }
}
