// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/sections.h"

#include <cmath>

#include "core/report/wording.h"

namespace filial::report {

std::string say(MessageId id, std::vector<Argument> arguments) {
    return render({id, std::move(arguments)});
}

void add_heading(Document& document, int level, std::string text) {
    document.blocks.emplace_back(Heading{level, std::move(text)});
}

void add_text(Document& document, std::string text, Paragraph::Role role) {
    document.blocks.emplace_back(Paragraph{std::move(text), role});
}

void add_facts(Document& document, const std::vector<std::pair<std::string, std::string>>& facts) {
    Table table;
    table.columns = {{"", Align::Left}, {"", Align::Left}};
    for (const auto& [what, value] : facts) {
        if (!value.empty()) {
            table.rows.push_back({{what, value}, TableRow::Role::Body});
        }
    }
    if (!table.rows.empty()) {
        document.blocks.emplace_back(std::move(table));
    }
}

std::string shown_p(const Maybe<fit::Tail>& p) {
    if (!p) {
        return "–";
    }
    const bool impossible = p->p == 0.0 && std::isinf(p->log10_p);
    return impossible ? "0" : p_text(p->p);
}

std::string shown_statistic(const Maybe<double>& value) {
    return value && std::isfinite(*value) ? statistic_text(*value) : "–";
}

std::string shown_count(std::int64_t count) {
    return fixed_text(static_cast<double>(count), 0);
}

} // namespace filial::report
