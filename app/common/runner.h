// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <functional>
#include <memory>

#include <QObject>

#include "core/numeric/cancellation.h"

// Terms. The runner computes off the GUI thread. Each request has an id; a newer request supersedes and cancels the
// older one; only the result of the newest request is delivered, on the GUI thread. `busyChanged(true)` comes after 200
// ms.
namespace filial::app {

class RunnerBase : public QObject {
    Q_OBJECT
public:
    explicit RunnerBase(QObject* parent = nullptr);
    ~RunnerBase() override;
    std::uint64_t latestRequest() const;
    bool busy() const; ///< a request has been running for more than 200 ms
    void cancel();
Q_SIGNALS:
    void busyChanged(bool busy);
    void progressed(double share);
    void cancelled();

protected:
    using Work = std::function<std::shared_ptr<void>(const CancellationToken&, const Progress&)>;
    std::uint64_t start(Work work, std::function<void(std::uint64_t, std::shared_ptr<void>)> deliver);

private:
    void finish();
    struct Private;
    std::unique_ptr<Private> p_;
};

template <class T> class Runner : public RunnerBase {
public:
    using RunnerBase::RunnerBase;
    /// `work` runs on another thread; `deliver` gets the request id and the result on this one, unless superseded.
    std::uint64_t request(std::function<T(const CancellationToken&, const Progress&)> work,
                          std::function<void(std::uint64_t, const T&)> deliver) {
        return start([work = std::move(work)](const CancellationToken& cancel, const Progress& progress)
                         -> std::shared_ptr<void> { return std::make_shared<T>(work(cancel, progress)); },
                     [deliver = std::move(deliver)](std::uint64_t id, const std::shared_ptr<void>& result) {
                         deliver(id, *std::static_pointer_cast<T>(result));
                     });
    }
};

} // namespace filial::app
