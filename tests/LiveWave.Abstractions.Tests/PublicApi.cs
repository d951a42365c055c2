using PublicApiGenerator;

namespace LiveWave.Abstractions.Tests;

/// <summary>The public surface of Abstractions as one text. Plug-ins bind to it: a change is a reviewed act.</summary>
public sealed class PublicApi
{
    [Fact]
    public void Is_the_approved_one()
    {
        var folder = Path.Combine(AppContext.BaseDirectory, "Approved");
        var approved = File.ReadAllText(Path.Combine(folder, "LiveWave.Abstractions.approved.txt"));

        var actual = typeof(IFeed).Assembly.GeneratePublicApi(new ApiGeneratorOptions { IncludeAssemblyAttributes = false });

        if (approved.ReplaceLineEndings("\n").TrimEnd() != actual.ReplaceLineEndings("\n").TrimEnd())
        {
            var received = Path.Combine(folder, "LiveWave.Abstractions.received.txt");
            File.WriteAllText(received, actual.ReplaceLineEndings("\n").TrimEnd() + "\n");
            Assert.Fail($"the public API differs from the approved one; if that is meant, copy {received} over Approved/LiveWave.Abstractions.approved.txt");
        }
    }

    [Fact]
    public void Every_contract_has_at_most_four_members()
    {
        var contracts = typeof(IFeed).Assembly.GetExportedTypes().Where(type => type.IsInterface);

        Assert.All(contracts, contract =>
        {
            var own = contract.GetMembers().Count(member => member is not System.Reflection.MethodInfo { IsSpecialName: true });
            var inherited = contract.GetInterfaces().Sum(parent => parent.GetMembers().Length);
            Assert.InRange(own + inherited, 1, 4);
        });
    }
}
