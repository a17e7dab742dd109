// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <atomic>
#include <functional>
#include <memory>

// Terms. A cancellation token is shared by the one who asked for a long computation and the computation.
namespace filial {

class CancellationToken {
public:
    CancellationToken() : cancelled_(std::make_shared<std::atomic<bool>>(false)) {}
    void cancel() const { cancelled_->store(true, std::memory_order_relaxed); }
    [[nodiscard]] bool cancelled() const { return cancelled_->load(std::memory_order_relaxed); }

private:
    std::shared_ptr<std::atomic<bool>> cancelled_;
};

/// Called now and then with the share done, 0 to 1. May be empty.
using Progress = std::function<void(double)>;

} // namespace filial
