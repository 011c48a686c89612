using CsCheck;
using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Plans;

public class PlanLawTests
{
    private static readonly string Whole = string.Join('\n', PlanKeyList.All.GroupBy(k => k.Table).Select(t =>
        (t.Key switch { "" => "", "limit" or "limit-line" => $"[[{t.Key}]]\n", var name => $"[{name}]\n" }) + string.Join('\n', t.Where(k => k.Name != "rate").Select(k => $"{k.Name} = {k.Example}"))))
        + "\n[conditions]\nsupply = \"5 V\"\n";

    [Fact]
    public void A_plan_with_every_key_is_read()
    {
        Assert.Single(PlanReader.Parse(Whole, "plan.toml").Limits);
        Assert.Single(PlanReader.Parse(Whole, "plan.toml").LimitLines);
    }

    // Whatever a person's editor leaves behind: the plan is read, or refused with its line; nothing else comes out.
    [Fact]
    public void A_damaged_plan_is_read_or_refused_with_its_line_and_never_breaks_the_program() =>
        Gen.Select(Gen.Int[0, Whole.Length - 1], Gen.Int[0, 12], Gen.Char["\"[]{}=.,#'-+ \n\\eE1x0µ\u0000\uD800Hzppm"].Array[0, 7]).Sample((at, cut, put) =>
        {
            string text = Whole[..at] + new string(put) + Whole[Math.Min(Whole.Length, at + cut)..];
            try
            {
                PlanReader.Parse(text, "plan.toml");
                return true;
            }
            catch (PlanException e)
            {
                return e.Line is >= 1 && e.Line <= text.Count(c => c == '\n') + 1;
            }
        }, seed: "f7SMPt04c9A2", iter: 2000); // A seed whose first text made the parser itself throw.
}
