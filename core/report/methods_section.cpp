// SPDX-License-Identifier: GPL-3.0-or-later
#include <set>

#include "core/report/sections.h"
#include "core/report/wording.h"

// The methods paragraph: only what was used, and the sources of what was used.
namespace filial::report {

namespace {

/// Sentences in the order said, and references by the id of their entry, which are in alphabetical order.
struct Methods {
    std::string text;
    std::set<MessageId> references;

    void add(MessageId sentence, std::vector<Argument> arguments, const std::set<MessageId>& sources) {
        text += (text.empty() ? "" : " ") + say(sentence, std::move(arguments));
        references.insert(sources.begin(), sources.end());
    }
};

void tell_test(Methods& methods, const fit::GoodnessOfFit& fit) {
    const std::string notation = fit.input.hypothesis.notation();
    methods.add(MessageId::MethodChiSquare, {ratio_argument(notation), count_argument(fit.df)},
                {MessageId::CitePearson1900, MessageId::CiteFisher1922});
    if (!fit.estimates.empty() || fit.input.fitted_elsewhere > 0) {
        methods.add(MessageId::MethodFitted, {}, {MessageId::CiteFisher1924});
    }
    if (!fit.input.joins.empty()) {
        methods.add(MessageId::MethodJoined, {}, {});
    }
    if (fit.g && fit.g->williams_statistic) {
        methods.add(MessageId::MethodWilliams, {}, {MessageId::CiteWilliams1976});
    }
    if (fit.yates) {
        methods.add(MessageId::MethodYates, {}, {MessageId::CiteYates1934});
    }
}

MessageId order_text(fit::Order order) {
    switch (order) {
    case fit::Order::ChiSquare:
        return MessageId::MethodOrderChiSquare;
    case fit::Order::G:
        return MessageId::MethodOrderG;
    case fit::Order::Probability:
        break;
    }
    return MessageId::MethodOrderProbability;
}

void tell_exact(Methods& methods, const fit::GoodnessOfFit& fit) {
    if (fit.exact) {
        methods.add(MessageId::MethodExact, {text_argument(say(order_text(fit.exact->order)))}, {});
    }
    if (fit.simulated) {
        methods.add(
            MessageId::MethodSimulated,
            {count_argument(fit.simulated->replicates), count_argument(static_cast<std::int64_t>(fit.simulated->seed))},
            {MessageId::CiteDavison1997});
    }
}

void tell_classes(Methods& methods, const fit::GoodnessOfFit& fit) {
    const auto any = [&](auto member) {
        for (const fit::ClassResult& c : fit.classes) {
            if ((c.*member).has_value()) {
                return true;
            }
        }
        return false;
    };
    if (any(&fit::ClassResult::adjusted_residual)) {
        methods.add(MessageId::MethodResiduals, {}, {MessageId::CiteHaberman1973});
    }
    if (any(&fit::ClassResult::p_holm)) {
        methods.add(MessageId::MethodHolm, {}, {MessageId::CiteHolm1979});
    }
    if (any(&fit::ClassResult::interval_low)) {
        methods.add(MessageId::MethodWilson, {}, {MessageId::CiteWilson1927});
    }
    if (fit.partition) {
        methods.add(MessageId::MethodPartition, {}, {MessageId::CiteMather1951});
    }
}

void tell_families(Methods& methods, const families::Heterogeneity& families) {
    methods.add(MessageId::MethodFamilies, {}, {MessageId::CiteMather1951});
    if (families.contingency) {
        methods.add(MessageId::MethodContingency, {}, {MessageId::CitePearson1900, MessageId::CiteFisher1922});
    }
    if (!families.outliers.empty()) {
        methods.add(MessageId::MethodOdd, {}, {MessageId::CiteHolm1979, MessageId::CiteBenjamini1995});
    }
}

} // namespace

void add_methods(Document& document, const CrossAnalysis& analysis) {
    if (!analysis.totals) {
        return;
    }
    Methods methods;
    tell_test(methods, *analysis.totals);
    tell_exact(methods, *analysis.totals);
    tell_classes(methods, *analysis.totals);
    if (analysis.heterogeneity) {
        tell_families(methods, *analysis.heterogeneity);
    }
    methods.add(MessageId::MethodLevel, {number_argument(analysis.totals->input.alpha, 3)}, {});
    add_heading(document, 2, say(MessageId::ReportMethods));
    add_text(document, methods.text);
    for (const MessageId reference : methods.references) {
        add_text(document, say(reference), Paragraph::Role::Note);
    }
}

} // namespace filial::report
