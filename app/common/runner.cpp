// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/runner.h"

#include <mutex>

#include <QThreadPool>
#include <QTimer>

namespace filial::app {
namespace {
constexpr int kQuietMilliseconds = 200; // shorter waits are not worth a flicker
}

struct RunnerBase::Private {
    std::uint64_t latest = 0;
    bool running = false;
    bool busy = false;
    CancellationToken token;
    QTimer quiet;
    // Outlives the runner: a worker that ends late must be able to ask whether anyone is still there.
    struct Link {
        std::mutex mutex;
        RunnerBase* runner = nullptr;
    };
    std::shared_ptr<Link> link = std::make_shared<Link>();
};

RunnerBase::RunnerBase(QObject* parent) : QObject(parent), p_(std::make_unique<Private>()) {
    p_->link->runner = this;
    p_->quiet.setSingleShot(true);
    p_->quiet.setInterval(kQuietMilliseconds);
    connect(&p_->quiet, &QTimer::timeout, this, [this] {
        p_->busy = true;
        Q_EMIT busyChanged(true);
    });
}

RunnerBase::~RunnerBase() {
    p_->token.cancel();
    const std::lock_guard guard(p_->link->mutex);
    p_->link->runner = nullptr;
}

std::uint64_t RunnerBase::latestRequest() const {
    return p_->latest;
}

bool RunnerBase::busy() const {
    return p_->busy;
}

void RunnerBase::finish() {
    p_->running = false;
    p_->quiet.stop();
    if (!p_->busy)
        return;
    p_->busy = false;
    Q_EMIT busyChanged(false);
}

void RunnerBase::cancel() {
    if (!p_->running)
        return;
    p_->token.cancel();
    ++p_->latest; // what still comes from the worker is of an older request now
    finish();
    Q_EMIT cancelled();
}

std::uint64_t RunnerBase::start(Work work, std::function<void(std::uint64_t, std::shared_ptr<void>)> deliver) {
    p_->token.cancel();
    p_->token = CancellationToken();
    const std::uint64_t id = ++p_->latest;
    if (!p_->running)
        p_->quiet.start(); // a superseding request keeps the clock: the person has been waiting since the first
    p_->running = true;

    const auto post = [link = p_->link](std::function<void(RunnerBase&)> call) {
        const std::lock_guard guard(link->mutex);
        if (link->runner == nullptr)
            return;
        QMetaObject::invokeMethod(
            link->runner, [runner = link->runner, call = std::move(call)] { call(*runner); }, Qt::QueuedConnection);
    };
    const auto task = [post, id, token = p_->token, work = std::move(work), deliver = std::move(deliver)] {
        const Progress progress = [post, id](double share) {
            post([id, share](RunnerBase& runner) {
                if (runner.latestRequest() == id)
                    Q_EMIT runner.progressed(share);
            });
        };
        std::shared_ptr<void> result = work(token, progress);
        post([id, token, result = std::move(result), deliver](RunnerBase& runner) {
            if (runner.latestRequest() != id || token.cancelled())
                return;
            runner.finish();
            deliver(id, result);
        });
    };
    QThreadPool::globalInstance()->start(task);
    return id;
}

} // namespace filial::app
