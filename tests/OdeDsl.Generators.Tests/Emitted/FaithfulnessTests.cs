using System.Reflection;
using System.Runtime.Loader;
using OdeDsl.Generators.Tests.Harness;

namespace OdeDsl.Generators.Tests.Emitted;

/// <summary>The whole way from source: emitted rates and observables against the user's own members, called on the model itself.</summary>
public sealed class FaithfulnessTests
{
    private const string Source = """
        using System;
        using OdeDsl;
        namespace Plant;

        internal static class Curves
        {
            public const double Shift = 1.0 / 3;
            public static readonly double Gain = 2.5;
            public static double Saturate(double x, double limit) => x > limit ? limit : x < -limit ? -limit : x;
            public static double Smooth(double x) { double s = x * x; if (s < 1) return s * (3 - 2 * s); return Math.Sqrt(s); }
        }

        [OdeModel]
        public partial class Loop
        {
            [State(Initial = 1)] public partial double Level { get; set; }
            [State] public partial double Speed { get; set; }
            [State, Angle] public partial double Angle { get; set; }
            [Parameter(0.7)] public partial double Gain { get; set; }
            [Parameter(2)] public partial double Limit { get; set; }

            private double Error => Level - Limit / 3 - Speed * 0.1;
            private double Torque(double time) => Math.Sin(Angle + 2 * Math.PI * time) / (1.5 - Math.Cos(Angle) - 1.0 / 7);

            [Rate(nameof(Level))] private double LevelRate => Gain * (Speed - Curves.Saturate(Error, Limit)) - (Level - (Speed - Gain)) / 3 / Gain;

            [Rate(nameof(Speed))]
            private double SpeedRate(double time)
            {
                double force = Math.Clamp(Torque(time), -Limit, Limit) - 0.1 * Speed * Math.Abs(Speed);
                if (Level > Curves.Gain) force -= Math.Exp(-(Level - Curves.Shift));
                else if (time % 0.5 < 0.25) force += Curves.Smooth(Level) * Math.Pow(Math.Abs(Level), 1.7);
                return force + (Speed switch { < -1 => -Speed * Speed, > 1 and < 2 => Math.Floor(3 * Speed), _ => Math.Sign(Level - 0.3) / 2.0 });
            }

            [Rate(nameof(Angle))] private double AngleRate => Speed > 0 && Level < 2 || Math.Max(Level, Speed) > 3 ? Speed + 7 / 2 : -Speed % 0.7 * (1 / Limit);

            [Observable] public double Power => Speed * Math.Min(Level, Math.Round(10 * Angle) / 10) - Math.Atan2(Level, Speed);
            [Observable] public double Phase(double time) => Math.Truncate(time * 3) + Math.IEEERemainder(Angle, 2 * Math.PI);
        }
        """;

    [Fact]
    public void Emitted_rates_equal_the_users_members_bit_for_bit()
    {
        GeneratorRun run = Compiling.Run(Source).WithoutProblems();
        using MemoryStream image = new();
        Assert.True(run.Output.Emit(image).Success);
        image.Position = 0;
        Type type = new AssemblyLoadContext(null, isCollectible: true).LoadFromStream(image).GetType("Plant.Loop")!;
        IEmittedCalls calls = EmittedModel.CallsOf(type);
        object model = Activator.CreateInstance(type)!;
        Random random = new(20240607);
        for (int i = 0; i < 2000; i++)
        {
            double Next() => 3.5 * (2 * random.NextDouble() - 1);
            (double[] state, double[] parameters, double time) = ([Next(), Next(), Next()], [Math.Abs(Next()), Math.Abs(Next())], Math.Abs(Next()));
            Set(model, state, parameters);
            Assert.Equal([Call(model, "LevelRate", time), Call(model, "SpeedRate", time), Call(model, "AngleRate", time)], calls.Rates(time, state, parameters));
            Assert.Equal([Call(model, "Power", time), Call(model, "Phase", time)], calls.Observables(time, state, parameters));
            double[] regime = calls.Regime(time, state, parameters);
            Assert.Equal(calls.Rates(time, state, parameters), calls.Rates(time, state, parameters, regime));
        }

        Assert.Contains("Speed switch", calls.Description.States[1].RateText, StringComparison.Ordinal);
        Assert.Contains(calls.Description.Switches, static function => function.Text == "Level > Curves.Gain");
        Assert.True(calls.Description.DependsOnTime);
    }

    private static void Set(object model, double[] state, double[] parameters)
    {
        foreach ((string name, double value) in new[] { ("Level", state[0]), ("Speed", state[1]), ("Angle", state[2]), ("Gain", parameters[0]), ("Limit", parameters[1]) })
            model.GetType().GetProperty(name)!.SetValue(model, value);
    }

    private static double Call(object model, string name, double time)
    {
        const BindingFlags any = BindingFlags.Instance | BindingFlags.Public | BindingFlags.NonPublic;
        return model.GetType().GetProperty(name, any) is { } property
            ? (double)property.GetValue(model)!
            : (double)model.GetType().GetMethod(name, any)!.Invoke(model, [time])!;
    }
}
