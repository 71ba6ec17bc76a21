using System.Text.Json;
using OdeDsl.Assessment;
using OdeDsl.Tests.Branches;
using Xunit;

namespace OdeDsl.Tests.Assessment;

public class AssessmentJsonTests
{
    private static readonly AssessmentOptions Quick = new() { SampledStarts = 8, TimingRuns = 1, Tolerances = [1e-4, 1e-6] };

    [Fact]
    public void Equal_models_and_seeds_give_equal_text_without_the_timings()
    {
        string first = new Machine().Assess(Quick).ToJson(includeTimings: false);
        string second = new Machine().Assess(Quick).ToJson(includeTimings: false);
        Assert.Equal(first, second);
        Assert.DoesNotContain("wallTimeSeconds", first, StringComparison.Ordinal);
        Assert.DoesNotContain("allocatedBytes", first, StringComparison.Ordinal);
        Assert.DoesNotContain("timingRemark", first, StringComparison.Ordinal);
    }

    [Fact]
    public void The_text_holds_the_four_answers_by_name()
    {
        ModelAssessment view = new Machine().Assess(Quick);
        using JsonDocument document = JsonDocument.Parse(view.ToJson());
        JsonElement root = document.RootElement;
        Assert.Equal(1, root.GetProperty("schema").GetInt32());
        Assert.Equal("Machine", root.GetProperty("model").GetString());
        JsonElement rest = root.GetProperty("rests").GetProperty("items")[0];
        Assert.Equal("rest 1", rest.GetProperty("name").GetString());
        Assert.Equal(view.Rests.Equilibria[0].State[0], rest.GetProperty("state").GetProperty("Angle").GetDouble());
        Assert.Equal("Settles", root.GetProperty("motions").GetProperty("working").GetProperty("kind").GetString());
        Assert.Equal(1, Math.Abs(root.GetProperty("motions").GetProperty("cycles")[0].GetProperty("turns").GetProperty("Angle").GetInt32()));
        Assert.Equal(view.Margins.Narrowest!.Parameter.Name, root.GetProperty("margins").GetProperty("narrowest").GetString());
        Assert.Equal(view.Margins.Parameters.Count, root.GetProperty("margins").GetProperty("items").GetArrayLength());
        Assert.Equal(view.Method.Recommended.ToString(), root.GetProperty("method").GetProperty("recommended").GetString());
        Assert.True(root.GetProperty("method").GetProperty("measurements")[0].GetProperty("wallTimeSeconds").GetDouble() > 0);
    }

    [Fact]
    public void Numbers_that_JSON_cannot_hold_are_null()
    {
        using JsonDocument document = JsonDocument.Parse(new Lorenz().Assess(Quick with { SampledStarts = 0, Margins = false }).ToJson());
        JsonElement rho = document.RootElement.GetProperty("parameters")[1];
        Assert.Equal("Rho", rho.GetProperty("name").GetString());
        Assert.Equal(JsonValueKind.Null, rho.GetProperty("lower").ValueKind);
        Assert.Equal(28, rho.GetProperty("value").GetDouble());
    }
}
