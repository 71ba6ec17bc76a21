using OdeDsl.Assessment;
using OdeDsl.Modeling;

namespace OdeDsl;

/// <summary>The assessment of models: four answers in one call.</summary>
public static class AssessExtensions
{
    /// <summary>
    /// Assesses a model: where it rests, whether it keeps moving and how, how far each parameter stands from a change of that answer, and
    /// which integration method computes it best. The model is not changed.
    /// </summary>
    /// <remarks>
    /// Equal models, options and seeds give equal results, measured times and allocated bytes excepted. Results are predictions of a
    /// model: where people or plant depend on them, they support and do not replace verification, local codes and the judgement of
    /// licensed engineers.
    /// </remarks>
    /// <typeparam name="TModel">The model class.</typeparam>
    /// <typeparam name="TSystem">Its generated equations.</typeparam>
    /// <param name="model">The model.</param>
    /// <param name="options">How thoroughly to assess it.</param>
    /// <param name="progress">Receives the stages and the share done.</param>
    /// <param name="cancellationToken">Stops the assessment.</param>
    /// <returns>The four answers with their evidence.</returns>
    /// <exception cref="ArgumentException">An option is out of its range, or a parameter or state of the model is not finite.</exception>
    /// <exception cref="OperationCanceledException">The assessment was cancelled.</exception>
    public static ModelAssessment Assess<TModel, TSystem>(
        this IOdeModel<TModel, TSystem> model,
        AssessmentOptions? options = null,
        IProgress<AssessmentProgress>? progress = null,
        CancellationToken cancellationToken = default)
        where TModel : class, IOdeModel<TModel, TSystem>
        where TSystem : struct, IOdeSystem =>
        DynamicSystem.Of(model).Assess(options, progress, cancellationToken);

    /// <summary>
    /// Assesses a system: where it rests, whether it keeps moving and how, how far each parameter stands from a change of that answer, and
    /// which integration method computes it best.
    /// </summary>
    /// <remarks><inheritdoc cref="Assess{TModel, TSystem}" path="/remarks"/></remarks>
    /// <param name="system">The system.</param>
    /// <param name="options">How thoroughly to assess it.</param>
    /// <param name="progress">Receives the stages and the share done.</param>
    /// <param name="cancellationToken">Stops the assessment.</param>
    /// <returns>The four answers with their evidence.</returns>
    /// <exception cref="ArgumentException">An option is out of its range.</exception>
    /// <exception cref="OperationCanceledException">The assessment was cancelled.</exception>
    public static ModelAssessment Assess(
        this DynamicSystem system,
        AssessmentOptions? options = null,
        IProgress<AssessmentProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(system);
        options ??= new AssessmentOptions();
        AssessmentOptions.Validate(options);
        return new Assessor(system, options, progress, cancellationToken).Run();
    }
}
