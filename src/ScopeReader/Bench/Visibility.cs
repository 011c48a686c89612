using System.Runtime.CompilerServices;

[assembly: InternalsVisibleTo("ScopeReader.Tests")]
