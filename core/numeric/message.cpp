// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/numeric/message.h"

namespace filial {

Argument text_argument(std::string text) {
    Argument argument;
    argument.text = std::move(text);
    return argument;
}

Argument ratio_argument(std::string notation) {
    Argument argument;
    argument.kind = ArgumentKind::RatioText;
    argument.text = std::move(notation);
    return argument;
}

Argument count_argument(std::int64_t count) {
    Argument argument;
    argument.kind = ArgumentKind::Count;
    argument.count = count;
    return argument;
}

Argument size_argument(std::size_t size) {
    return count_argument(static_cast<std::int64_t>(size));
}

Argument number_argument(double number, int decimals) {
    Argument argument;
    argument.kind = ArgumentKind::Number;
    argument.number = number;
    argument.decimals = decimals;
    return argument;
}

Argument p_argument(double p) {
    Argument argument;
    argument.kind = ArgumentKind::PValue;
    argument.number = p;
    return argument;
}

Argument percent_argument(double share, int decimals) {
    Argument argument;
    argument.kind = ArgumentKind::Percent;
    argument.number = share;
    argument.decimals = decimals;
    return argument;
}

Message plain_message(MessageId id) {
    return Message{id, {}};
}

} // namespace filial
