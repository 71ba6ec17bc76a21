using OdeDsl.Generators.Reading;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Reading;

public sealed class SimpleModelTests
{
    private const string Tank = """
        using System;
        using OdeDsl;
        namespace Waterworks;

        /// <summary>A <see cref="Tank"/> on
        /// a tunnel.</summary>
        [OdeModel]
        public sealed partial class Tank
        {
            /// <summary>Water level.</summary>
            [State(Initial = -2.0, Lower = -15, Upper = 15, Unit = "1")] public partial double Level { get; set; }
            [State(Initial = 2)] public partial double Velocity { get; private set; }
            [Parameter(60.0, Lower = 5, Upper = 400, Unit = "1")] public partial double Area { get; set; }
            private const double Gravity = 9.81;
            private double Flow => Area / (Gravity + Level);
            [Rate(nameof(Level))] private double LevelRate => (Velocity /* speed */ - Flow)
                / Area;
            [Rate(nameof(Velocity))] private double VelocityRate(double time)
            {
                double head = -Level;
                if (time < 1) head *= 2;
                return head + 1 / 2;
            }
        }
        """;

    [Fact]
    public void A_simple_model_is_read_as_written()
    {
        ModelReading reading = ModelText.Read(Tank);
        Assert.Empty(reading.Problems);
        ModelDefinition model = reading.Model!;
        Assert.Equal("A Tank on a tunnel.", model.Summary);
        Assert.Equal("Water level.", model.States[0].Property.Summary);
        Assert.Equal("(Velocity - Flow) / Area", model.States[0].RateText);
        Assert.Equal("Divide(Subtract(Velocity, Divide(Area, Add(9.81, Level))), Area)", ModelText.Show(model, model.States[0].Rate));
        Assert.Equal(
            "Add(Conditional(Less(time, 1), Multiply(Negate(Level), 2), Negate(Level)), 0)", ModelText.Show(model, model.States[1].Rate));
        Assert.Equal(["get", "private set"], model.States[1].Property.Accessors);
        Assert.Equal("time < 1", Assert.Single(model.ConditionTexts).Text);
    }
}
