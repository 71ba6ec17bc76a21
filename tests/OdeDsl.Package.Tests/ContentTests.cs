using System.IO.Compression;
using System.Reflection.Metadata;
using System.Reflection.PortableExecutable;
using System.Xml.Linq;

namespace OdeDsl.Package.Tests;

/// <summary>What lies in the packed files.</summary>
[Collection(Packed.Name)]
public sealed class ContentTests(Workplace place)
{
    // The portable debug format of .NET, section "Embedded Source".
    private static readonly Guid EmbeddedSource = new("0E8A571B-6926-466E-B4AD-8AB04611F5FE");

    [Theory]
    [InlineData("lib/net10.0/OdeDsl.dll")]
    [InlineData("lib/net10.0/OdeDsl.xml")]
    [InlineData("analyzers/dotnet/cs/OdeDsl.Generators.dll")]
    [InlineData("analyzers/dotnet/cs/OdeDsl.CodeFixes.dll")]
    [InlineData("README.md")]
    [InlineData("LICENSE")]
    public void The_package_holds(string file)
    {
        using ZipArchive package = Open("OdeDsl", "nupkg");
        Assert.True(package.GetEntry(file)?.Length > 0, file);
    }

    [Fact]
    public void The_package_names_its_licence_and_readme_and_depends_on_nothing_but_the_linear_algebra()
    {
        using ZipArchive package = Open("OdeDsl", "nupkg");
        using Stream stream = package.GetEntry("OdeDsl.nuspec")!.Open();
        XElement metadata = XDocument.Load(stream).Root!.Elements().Single();
        string Value(string name) => metadata.Elements().Single(element => element.Name.LocalName == name).Value;
        Assert.Equal(Workplace.Version, Value("version"));
        Assert.Equal("MIT", Value("license"));
        Assert.Equal("README.md", Value("readme"));
        XElement dependency = Assert.Single(metadata.Descendants(), static element => element.Name.LocalName == "dependency");
        Assert.Equal("MathNet.Numerics", dependency.Attribute("id")!.Value);
    }

    [Fact]
    public void The_library_is_deterministic_and_its_symbols_carry_the_sources()
    {
        using PEReader library = new(Whole("nupkg", "lib/net10.0/OdeDsl.dll"));
        Assert.Contains(library.ReadDebugDirectory(), static entry => entry.Type == DebugDirectoryEntryType.Reproducible);

        using MetadataReaderProvider symbols = MetadataReaderProvider.FromPortablePdbStream(Whole("snupkg", "lib/net10.0/OdeDsl.pdb"));
        MetadataReader reader = symbols.GetMetadataReader();
        Assert.NotEmpty(reader.Documents);
        Assert.All(reader.Documents, document => Assert.Contains(
            reader.GetCustomDebugInformation(document), info => reader.GetGuid(reader.GetCustomDebugInformation(info).Kind) == EmbeddedSource));
    }

    private MemoryStream Whole(string kind, string file)
    {
        using ZipArchive package = Open("OdeDsl", kind);
        using Stream content = package.GetEntry(file)!.Open();
        MemoryStream whole = new();
        content.CopyTo(whole);
        whole.Position = 0;
        return whole;
    }

    private ZipArchive Open(string package, string kind) => ZipFile.OpenRead(Path.Combine(place.Feed, $"{package}.{Workplace.Version}.{kind}"));
}
