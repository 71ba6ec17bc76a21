namespace OdeDsl.Generators.Writing;

/// <summary>The attributes that tell tools which members are generated.</summary>
internal static class GeneratedMark
{
    public const string NotCovered = "[global::System.Diagnostics.CodeAnalysis.ExcludeFromCodeCoverage]";

    public static readonly string Code = "[global::System.CodeDom.Compiler.GeneratedCode(\"OdeDsl\", "
        + Literals.Text(typeof(GeneratedMark).Assembly.GetName().Version.ToString(3)) + ")]";
}
