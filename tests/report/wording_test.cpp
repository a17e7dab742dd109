// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/wording.h"

#include <charconv>
#include <cmath>
#include <cstring>
#include <limits>
#include <random>
#include <regex>
#include <set>

#include <gtest/gtest.h>

namespace filial::report {
namespace {

MessageId id_at(std::size_t i) {
    return static_cast<MessageId>(i);
}

TEST(Wording, EveryMessageHasATextAndItsPlaceholdersAreNumberedWithoutGaps) {
    static const std::regex placeholder(R"(\{(\d+)(\?[^{}|]*\|[^{}|]*)?\})");
    static const std::regex slip(R"(\{\S|\S\})"); // "{ }" names the braces themselves
    for (std::size_t i = 0; i < message_count(); ++i) {
        const std::string text(english(id_at(i)));
        SCOPED_TRACE(message_name(id_at(i)));
        EXPECT_FALSE(text.empty());
        std::set<int> numbers;
        for (std::sregex_iterator at(text.begin(), text.end(), placeholder), end; at != end; ++at) {
            numbers.insert(std::stoi((*at)[1]));
        }
        int expected = 1;
        for (const int number : numbers) {
            EXPECT_EQ(number, expected++);
        }
        const std::string without = std::regex_replace(text, placeholder, "");
        EXPECT_FALSE(std::regex_search(without, slip)) << "a brace that is no placeholder: " << text;
        EXPECT_EQ(text.find("  "), std::string::npos);
    }
}

TEST(Wording, ArgumentsAreShownByTheirKind) {
    const auto show = [](const std::string& wording, std::vector<Argument> arguments) {
        return render({MessageId::NotComputed, std::move(arguments)}, [&](MessageId) { return wording; });
    };
    EXPECT_EQ(show("{2} of {1}", {count_argument(16), text_argument("nine")}), "nine of 16");
    EXPECT_EQ(show("P {1}", {p_argument(0.0004)}), "P <0.001");
    EXPECT_EQ(show("{1}", {percent_argument(0.056, 1)}), "5.6%");
    EXPECT_EQ(show("{1}", {number_argument(-2.5, 1)}), "−2.5");
    EXPECT_EQ(show("{1}", {ratio_argument("f2(coupling, r=0.2)")}), "f2(coupling,\u00a0r=0.2)");
    EXPECT_EQ(show("{1} {1?family|families}", {count_argument(1)}), "1 family");
    EXPECT_EQ(show("{1} {1?family|families}", {count_argument(12)}), "12 families");
    EXPECT_EQ(show("{1} and {2}", {count_argument(1)}), "1 and {2}") << "a slip in a translation stays visible";
    EXPECT_EQ(show("open { brace", {}), "open { brace");
    EXPECT_EQ(show("{1}", {text_argument("{2}")}), "{2}") << "what a person typed is never read as a template";
}

TEST(Wording, PIsShownToThreeDecimalsThenAsLessThan) {
    EXPECT_EQ(p_text(1.0), "1.000");
    EXPECT_EQ(p_text(0.9996), "1.000");
    EXPECT_EQ(p_text(0.498), "0.498");
    EXPECT_EQ(p_text(0.001), "0.001");
    EXPECT_EQ(p_text(0.00099999), "<0.001") << "never rounded up over the limit";
    EXPECT_EQ(p_text(1e-300), "<0.001");
    EXPECT_EQ(p_text(0.0), "<0.001");
    EXPECT_EQ(p_text(0.25, {',', "−"}), "0,250");
    EXPECT_EQ(p_text(0.0, {',', "−"}), "<0,001");
}

TEST(Wording, NumbersHaveAMinusSignAndNoNegativeZero) {
    EXPECT_EQ(statistic_text(2.3784), "2.378");
    EXPECT_EQ(statistic_text(-9.3), "−9.300");
    EXPECT_EQ(fixed_text(-0.0004, 3), "0.000");
    EXPECT_EQ(fixed_text(-0.0, 0), "0");
    EXPECT_EQ(fixed_text(273.9375, 1), "273.9");
    EXPECT_EQ(fixed_text(1e15, 3), "1.000 × 10¹⁵");
    EXPECT_EQ(fixed_text(std::numeric_limits<double>::quiet_NaN(), 3), "–");
}

TEST(Wording, FullTextReadsBackToTheIdenticalDouble) {
    std::mt19937_64 bits(20240312);
    int read_back = 0;
    while (read_back < 20000) {
        const std::uint64_t pattern = bits();
        double value = 0.0;
        std::memcpy(&value, &pattern, sizeof value);
        if (!std::isfinite(value)) {
            continue;
        }
        const std::string text = full_text(value);
        double again = 0.0;
        const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), again);
        ASSERT_EQ(error, std::errc());
        ASSERT_EQ(end, text.data() + text.size());
        ASSERT_EQ(std::memcmp(&again, &value, sizeof value), 0) << text;
        ++read_back;
    }
    EXPECT_EQ(full_text(0.1), "0.1");
}

} // namespace
} // namespace filial::report
