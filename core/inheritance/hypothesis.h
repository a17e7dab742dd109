// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "core/numeric/quantities.h"
#include "core/numeric/result.h"
#include "core/ratio/ratio.h"

// Terms. A hypothesis gives the probability of each phenotype class, p(beta), as a function of its free
// parameters beta (none for a plain ratio), with derivatives, bounds and names. It knows where it came from.
// The notation is one for every blank, book and --ratio: a ratio, or a cross with its parameters:
// f2(coupling, r=0.2), f2(repulsion, r=fit), testcross(coupling, r=fit).
namespace filial::inheritance {

enum class Origin : std::uint8_t { Typed, Catalogue, Derived };
enum class CrossKind : std::uint8_t { F2, TestCross };
enum class Phase : std::uint8_t { Coupling, Repulsion };

struct FreeParameter {
    std::string name; ///< "r"
    double low = 0.0;
    double high = 0.0;
    friend bool operator==(const FreeParameter&, const FreeParameter&) = default;
};

/// p has one entry a class and sums to 1; derivatives[i][j] = d p_i / d beta_j.
struct ClassProbabilities {
    std::vector<double> p;
    std::vector<std::vector<double>> derivatives;
};

/// Two linked loci, both dominant: F2 (classes A_B_, A_bb, aaB_, aabb) or test cross (AB, Ab, aB, ab).
/// r empty: to be fitted from the counts.
struct LinkedCross {
    CrossKind kind = CrossKind::F2;
    Phase phase = Phase::Coupling;
    std::optional<RecombinationFraction> r;
    friend bool operator==(const LinkedCross&, const LinkedCross&) = default;
};

/// One factor of a ratio that is a product over loci, such as 9:3:3:1 = (3:1) x (3:1).
/// Terms are numbered row by row, first factor slowest.
struct Factor {
    std::vector<std::int64_t> weights;
    friend bool operator==(const Factor&, const Factor&) = default;
};

class Hypothesis {
public:
    [[nodiscard]] static Hypothesis from_ratio(ratio::Ratio ratio, Origin origin = Origin::Typed);
    [[nodiscard]] static Hypothesis from_linked_cross(LinkedCross cross, Origin origin = Origin::Typed);

    [[nodiscard]] std::size_t class_count() const;
    [[nodiscard]] const std::vector<FreeParameter>& free_parameters() const { return free_parameters_; }
    /// Class probabilities at beta; beta.size() == free_parameters().size(), each within its bounds; anything else
    /// throws std::invalid_argument.
    [[nodiscard]] ClassProbabilities at(std::span<const double> beta) const;
    /// The exact ratio, in the order of the classes after `bind`, where no real parameter enters.
    [[nodiscard]] const ratio::Ratio* ratio() const;
    /// The linked cross, where it is one. Its classes stand in the order of `binding()`; a closed form that names
    /// the classes must go through it.
    [[nodiscard]] const LinkedCross* linked_cross() const;
    /// Class i is term binding()[i] of the notation; as long as there are classes (0, 1, 2, … where never bound).
    [[nodiscard]] const std::vector<std::size_t>& binding() const { return binding_; }
    [[nodiscard]] Origin origin() const { return origin_; }
    /// Text that `read_hypothesis` reads back to an equal hypothesis; that of the unbound one after `bind`.
    [[nodiscard]] const std::string& notation() const { return notation_; }
    /// "9 of 16" for a ratio; for a cross with r, its genotype class (A_B_).
    [[nodiscard]] std::string term_text(std::size_t term) const;

    /// Same model and same order of classes; where a hypothesis came from does not make it another one.
    friend bool operator==(const Hypothesis& left, const Hypothesis& right) {
        return left.model_ == right.model_ && left.binding_ == right.binding_;
    }
    friend Result<Hypothesis> bind(const Hypothesis& hypothesis, std::span<const std::size_t> binding);

private:
    Hypothesis(std::variant<ratio::Ratio, LinkedCross> model, std::string notation, Origin origin);
    std::variant<ratio::Ratio, LinkedCross> model_; ///< a ratio in class order; a linked cross in term order
    std::vector<std::size_t> binding_;
    std::string notation_;
    std::vector<FreeParameter> free_parameters_;
    Origin origin_ = Origin::Typed;
};

/// The hypothesis with its terms in class order: class i is term binding[i]. Empty: in order. Errors: not every term
/// exactly once. Call it as inheritance::bind: unqualified, std::bind is found for standard arguments.
[[nodiscard]] Result<Hypothesis> bind(const Hypothesis& hypothesis, std::span<const std::size_t> binding);

/// Reads the notation. Errors give the byte place, what was found and what is allowed.
[[nodiscard]] Result<Hypothesis> read_hypothesis(std::string_view text);

/// The factors of a ratio for classes arranged as the levels of `level_counts` traits (for instance {2, 2}),
/// first trait slowest; empty where the ratio is not such a product.
[[nodiscard]] std::vector<Factor> product_factors(const ratio::Ratio& ratio, std::span<const std::size_t> level_counts);

} // namespace filial::inheritance
