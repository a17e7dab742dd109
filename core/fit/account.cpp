// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/account.h"

namespace filial::fit {
namespace {

void add(std::vector<Charge>& account, ChargeKind kind, Message what, int charge) {
    account.push_back({kind, std::move(what), charge});
}

} // namespace

std::vector<Charge> degrees_of_freedom_account(const Input& input, const Sample& sample,
                                               const std::vector<std::string>& cell_labels, int fitted) {
    std::vector<Charge> account;
    add(account, ChargeKind::Classes, {MessageId::FitChargeClasses, {}}, static_cast<int>(input.observed.size()));
    bool joined = false;
    for (std::size_t i = 0; i < sample.cells.size(); ++i)
        if (sample.cells[i].members.size() > 1) {
            joined = true;
            add(account, ChargeKind::Joined, {MessageId::FitChargeJoined, {text_argument(cell_labels[i])}},
                1 - static_cast<int>(sample.cells[i].members.size()));
        }
    // A free parameter may touch 0 at an estimate; only a ratio or fixed parameters forbid a class.
    if (input.hypothesis.free_parameters().empty())
        for (std::size_t i = 0; i < sample.cells.size(); ++i)
            if (sample.cells[i].probability == 0.0)
                add(account, ChargeKind::Forbidden, {MessageId::FitChargeForbidden, {text_argument(cell_labels[i])}},
                    -1);
    add(account, ChargeKind::TotalFixed, {MessageId::FitChargeTotal, {}}, -1);
    add(account, ChargeKind::Fitted, {MessageId::FitChargeFitted, {}}, -fitted);
    if (input.fitted_elsewhere > 0)
        add(account, ChargeKind::FittedElsewhere, {MessageId::FitChargeFittedElsewhere, {}}, -input.fitted_elsewhere);
    if (!joined)
        add(account, ChargeKind::Joined, {MessageId::FitChargeNoneJoined, {}}, 0);
    return account;
}

int sum_of_charges(const std::vector<Charge>& account) {
    int total = 0;
    for (const Charge& charge : account)
        total += charge.charge;
    return total;
}

} // namespace filial::fit
