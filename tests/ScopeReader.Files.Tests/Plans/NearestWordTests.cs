using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Plans;

public class NearestWordTests
{
    // By hand, counting slips; "kitten" and "sitting" is the example every textbook has.
    [Theory]
    [InlineData("kitten", "sitting", 3)]
    [InlineData("", "thd", 3)]
    [InlineData("thd", "thd", 0)]
    [InlineData("rise-tme", "rise-time", 1)]
    [InlineData("chian", "chain", 1)]
    [InlineData("THD", "thd", 0)]
    public void Slips_are_counted(string typed, string word, int slips) => Assert.Equal(slips, NearestWord.Distance(typed, word));

    [Fact]
    public void The_first_of_equally_near_words_is_named() => Assert.Equal("low", NearestWord.Of("lox", ["low", "lot", "thd"]));

    [Fact]
    public void Without_words_there_is_none() => Assert.Null(NearestWord.Of("a", []));
}
