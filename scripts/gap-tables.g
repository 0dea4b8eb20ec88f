# Character tables of the abstract groups behind the point groups and their double groups, from GAP's character-table
# library, as JSON on standard output. Run it with `sh scripts/gap-tables.sh`; see tests/unit/chem/symmetry/gap-tables.test.ts.
#
# Z n: cyclic; Dih n: dihedral of order 2n; Dic n: dicyclic (binary dihedral) of order 4n; 2T, 2O, 2I: the binary
# polyhedral groups. Values are GAP's exact cyclotomics; E(n) is exp(2 pi i / n).

SetPrintFormattingStatus("*stdout*", false);
LoadPackage("ctbllib", false);

plain := function(kind, n)
  if kind = "Z" then return CharacterTable("Cyclic", n);
  elif kind = "Dih" then return CharacterTable("Dihedral", 2 * n);
  elif kind = "Dic" then return CharacterTable("Quaternionic", 4 * n);
  elif kind = "A4" then return CharacterTable("A4");
  elif kind = "S4" then return CharacterTable("S4");
  elif kind = "A5" then return CharacterTable("A5");
  elif kind = "2T" then return CharacterTable("SL(2,3)");
  # Of the two double covers of S4 the one whose transpositions lift to elements of order 4.
  elif kind = "2O" then return CharacterTable("2.Symm(4)");
  elif kind = "2I" then return CharacterTable("2.A5");
  fi;
end;

jobs := [];
for n in [1..8] do Add(jobs, ["Z", n]); od;
for n in [10, 12, 14, 16, 20, 28] do Add(jobs, ["Z", n]); od;
for n in [3..8] do Add(jobs, ["Dih", n]); od;
for n in [12, 16] do Add(jobs, ["Dih", n]); od;
for n in [2..8] do Add(jobs, ["Dic", n]); od;
for n in [10, 12, 14, 16] do Add(jobs, ["Dic", n]); od;
for kind in ["A4", "S4", "A5", "2T", "2O", "2I"] do Add(jobs, [kind, 0]); od;

double := [];
for n in [2, 4, 6, 8, 12, 16] do Add(double, ["Z", n]); od;
for n in [3..8] do Add(double, ["Dih", n]); od;
for n in [2..8] do Add(double, ["Dic", n]); od;
for kind in ["A4", "S4", "A5", "2T", "2O", "2I"] do Add(double, [kind, 0]); od;

named := function(job)
  if job[2] = 0 then return job[1]; fi;
  return Concatenation(job[1], String(job[2]));
end;

written := function(name, table)
  local values, rows, chi;
  values := [];
  rows := [];
  for chi in Irr(table) do
    Add(rows, List(ValuesOfClassFunction(chi), function(v)
      local s;
      s := String(v);
      if not s in values then Add(values, s); fi;
      return Position(values, s) - 1;
    end));
  od;
  Print("  \"", name, "\": {\n    \"sizes\": ", SizesConjugacyClasses(table), ",\n    \"orders\": ",
    OrdersClassRepresentatives(table), ",\n    \"values\": [\"", JoinStringsWithSeparator(values, "\", \""),
    "\"],\n    \"rows\": ", rows, "\n  }");
end;

Print("{\n  \"gap\": \"", GAPInfo.Version, "\",\n  \"ctbllib\": \"", GAPInfo.PackagesLoaded.ctbllib[2], "\"");
for job in jobs do
  Print(",\n");
  written(named(job), plain(job[1], job[2]));
od;
for job in double do
  Print(",\n");
  written(Concatenation(named(job), "xZ2"),
    CharacterTableDirectProduct(plain(job[1], job[2]), CharacterTable("Cyclic", 2)));
od;
Print("\n}\n");
QUIT;
