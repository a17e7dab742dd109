// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/headless/verbs.h"
#include "core/report/cross_report.h"

namespace filial::app {

namespace {

constexpr std::string_view kWhole = R"(Filial: counts of offspring against what a cross should give.

  filial                  open the window on its start page
  filial BOOK             open the window on a book (.filial)
  filial VERB ...         answer here, without a window

Verbs (filial VERB --help says more):
  score      test counts against a ratio
  families   say whether replicate families agree
  derive     work out the offspring of a cross
  report     write the report of a cross as a page

  filial --version

Exit status: 0 computed, whatever the verdict; 2 the input is wrong; 3 a file
could not be read or written.
)";

constexpr std::string_view kScore = R"(Test counts against a ratio.

  filial score COUNT... --ratio R [options]
  filial score FILE [--ratio R] [--select CROSS] [options]

COUNT is a whole number or a sum such as 29+8, one for each class. FILE is a
table (CSV, header: family, then one column a class) or a book (.filial).
R is a ratio (9:3:3:1, 9/16, 7/16, 75%:25%) or a cross: f2(coupling, r=0.2),
testcross(repulsion, r=fit). A book brings its own.

  --select CROSS     the cross of a book, by name; needed where it has several
  --join 3,4         add classes together before testing; may be repeated
  --fitted M         M proportions were estimated elsewhere from the same counts
  --alpha A          level of significance (0.05)
  --labels a,b,c     names of the classes, for COUNT...
  --method M         auto, chi-square, exact or simulate
  --order O          order of the exact P: chi-square, g or probability
  --replicates N     samples of a simulated P (100000)
  --seed S           its seed (1)
  --json             one JSON object instead of text
)";

constexpr std::string_view kFamilies = R"(Say whether replicate families of one cross agree.

  filial families FILE [--ratio R] [--select CROSS] [options]

FILE is a table (CSV, header: family, then one column a class) or a book
(.filial); a book brings its own ratio. Families set aside, and those with a
class not looked at, are left out and listed.

  --select CROSS     the cross of a book, by name; needed where it has several
  --join 3,4         add classes together, in every family alike
  --fitted M         M proportions were estimated elsewhere from the same counts
  --alpha A          level of significance (0.05)
  --json             one JSON object instead of text
)";

constexpr std::string_view kDerive = R"(Work out the offspring of a cross: genotypes, classes and their ratio.

  filial derive 'Aa Bb x Aa Bb' [options]
  filial derive 'Aa selfed 2'

Loci are letters, up to three: upper case the dominant allele, lower case the
recessive.

  --linkage r        recombination fraction between neighbouring loci, 0 to 0.5
  --show LIST        what each genotype looks like; _ stands for either allele:
                     'A_B_=purple hairy, A_bb=purple smooth, aa=green'
  --json             one JSON object instead of text
)";

constexpr std::string_view kReport = R"(Write the report of one cross with its families.

  filial report BOOK --out FILE.html [options]

The page holds everything it needs and prints well. BOOK is never changed.

  --select CROSS     the cross, by name; needed where the book has several
  --ratio R          test against R instead of the book's hypothesis
  --alpha A          level of significance (0.05)
)";

std::string_view body_of(const std::string& verb) {
    if (verb == "score") {
        return kScore;
    }
    if (verb == "families") {
        return kFamilies;
    }
    if (verb == "derive") {
        return kDerive;
    }
    return verb == "report" ? kReport : kWhole;
}

} // namespace

std::string help_text(const std::string& verb) {
    std::string text(body_of(verb));
    report::Document cautions;
    for (const std::string& caution : report::standing_cautions()) {
        cautions.blocks.emplace_back(report::Paragraph{caution, report::Paragraph::Role::Body});
    }
    return text + "\n" + report::write_text(cautions);
}

} // namespace filial::app
