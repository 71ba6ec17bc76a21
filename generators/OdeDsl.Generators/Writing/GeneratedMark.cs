namespace OdeDsl.Generators.Writing;

/// <summary>The attributes that tell tools which members are generated.</summary>
internal static class GeneratedMark
{
    public const string Code = """[global::System.CodeDom.Compiler.GeneratedCode("OdeDsl", "0.1.0")]""";
    public const string NotCovered = "[global::System.Diagnostics.CodeAnalysis.ExcludeFromCodeCoverage]";
}
