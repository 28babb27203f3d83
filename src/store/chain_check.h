// The log itself: every writer's numbers without a gap, every hash as computed again, every parent there.
#ifndef NEARPIT_STORE_CHAIN_CHECK_H_
#define NEARPIT_STORE_CHAIN_CHECK_H_

#include <string>

#include "store/layer_check.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

// Law: a changed byte of a revision is one finding, that revision's; a revision taken out is found by the gap, unless it was its writer's last.
void check_chain(Connection& db, const std::string& start, Findings& findings);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_CHAIN_CHECK_H_
