// SPDX-License-Identifier: GPL-3.0-or-later
#include <atomic>
#include <thread>

#include "app/common/runner.h"
#include "tests/app/shell_fixture.h"

namespace filial::app {
namespace {

using namespace std::chrono_literals;

TEST(Runner, DeliversOnTheCallersThread) {
    Runner<int> runner;
    int got = 0;
    std::thread::id where;
    const auto id = runner.request([](const CancellationToken&, const Progress&) { return 7; },
                                   [&](std::uint64_t delivered, const int& value) {
                                       EXPECT_EQ(delivered, runner.latestRequest());
                                       got = value;
                                       where = std::this_thread::get_id();
                                   });
    EXPECT_EQ(id, runner.latestRequest());
    ASSERT_TRUE(waitFor([&] { return got == 7; }));
    EXPECT_EQ(where, std::this_thread::get_id());
}

TEST(Runner, NewerRequestSupersedesAndCancelsTheOlder) {
    Runner<int> runner;
    std::atomic<bool> sawCancel = false;
    std::vector<int> delivered;
    const auto take = [&](std::uint64_t, const int& value) { delivered.push_back(value); };
    runner.request(
        [&sawCancel](const CancellationToken& cancel, const Progress&) {
            while (!cancel.cancelled())
                std::this_thread::yield();
            sawCancel = true;
            return 1;
        },
        take);
    runner.request([](const CancellationToken&, const Progress&) { return 2; }, take);
    ASSERT_TRUE(waitFor([&] { return sawCancel.load() && !delivered.empty(); }));
    QCoreApplication::processEvents();
    EXPECT_EQ(delivered, std::vector<int>{2});
}

TEST(Runner, SaysBusyOnlyAfterAWhileAndCancelEndsIt) {
    Runner<int> runner;
    std::vector<bool> busy;
    bool cancelled = false;
    QObject::connect(&runner, &RunnerBase::busyChanged, &runner, [&](bool now) { busy.push_back(now); });
    QObject::connect(&runner, &RunnerBase::cancelled, &runner, [&] { cancelled = true; });
    QElapsedTimer clock;
    clock.start();
    int delivered = 0;
    runner.request(
        [](const CancellationToken& cancel, const Progress&) {
            while (!cancel.cancelled())
                std::this_thread::yield();
            return 1;
        },
        [&](std::uint64_t, const int&) { ++delivered; });
    EXPECT_FALSE(runner.busy());
    ASSERT_TRUE(waitFor([&] { return !busy.empty(); }));
    EXPECT_GE(clock.elapsed(), 190);
    EXPECT_TRUE(runner.busy());
    runner.cancel();
    EXPECT_TRUE(cancelled);
    EXPECT_EQ(busy, (std::vector<bool>{true, false}));
    EXPECT_EQ(delivered, 0);
}

TEST(Runner, ReportsProgress) {
    Runner<int> runner;
    double share = 0.0;
    bool done = false;
    QObject::connect(&runner, &RunnerBase::progressed, &runner, [&](double now) { share = now; });
    runner.request(
        [](const CancellationToken&, const Progress& progress) {
            progress(0.5);
            return 1;
        },
        [&](std::uint64_t, const int&) { done = true; });
    ASSERT_TRUE(waitFor([&] { return done; }));
    EXPECT_EQ(share, 0.5);
}

TEST(Runner, MayGoWhileItsWorkStillRuns) {
    std::atomic<bool> ended = false;
    bool delivered = false;
    {
        Runner<int> runner;
        runner.request(
            [&ended](const CancellationToken& cancel, const Progress&) {
                while (!cancel.cancelled())
                    std::this_thread::yield();
                ended = true;
                return 1;
            },
            [&](std::uint64_t, const int&) { delivered = true; });
    }
    ASSERT_TRUE(waitFor([&] { return ended.load(); }));
    QCoreApplication::processEvents();
    EXPECT_FALSE(delivered);
}

} // namespace
} // namespace filial::app
