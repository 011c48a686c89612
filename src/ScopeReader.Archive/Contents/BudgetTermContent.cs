namespace ScopeReader.Archive.Contents;

/// <summary>One line of a kept uncertainty budget.</summary>
/// <param name="Term">What it comes from.</param>
/// <param name="Value">Standard uncertainty of the input.</param>
/// <param name="Distribution">normal or rectangular.</param>
/// <param name="Sensitivity">Change of the reading with the input.</param>
/// <param name="Contribution">Standard uncertainty that it gives the reading.</param>
/// <param name="DegreesOfFreedom">Null for as good as infinitely many.</param>
/// <param name="Chain">True where captures that share the chain share the error.</param>
public sealed record BudgetTermContent(string Term, double Value, string Distribution, double Sensitivity, double Contribution, double? DegreesOfFreedom, bool Chain);
