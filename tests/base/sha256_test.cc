#include "base/sha256.h"

#include <gtest/gtest.h>

namespace nearpit {
namespace {

// The examples that NIST publishes with FIPS 180-4 (one block, two blocks), and that of FIPS 180-2 appendix B.3.
TEST(Sha256, PublishedExamples) {
  EXPECT_EQ(sha256_hex("abc"), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  EXPECT_EQ(sha256_hex("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq"),
            "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1");
  EXPECT_EQ(sha256_hex(std::string(1'000'000, 'a')),
            "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
}

// NIST's test vectors for byte-oriented messages (SHA256ShortMsg, lengths 0 and 8).
TEST(Sha256, ShortMessages) {
  EXPECT_EQ(sha256_hex(""), "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
  EXPECT_EQ(sha256_hex("\xd3"), "28969cdfa74a12c82f3bad960b0b000aca2ac329deea5c2328ebc6f2ba9802c1");
}

TEST(Sha256, EveryByteCounts) {
  using namespace std::string_view_literals;
  EXPECT_NE(sha256_hex("a\0b"sv), sha256_hex("a"sv));
  EXPECT_NE(sha256_hex("a\0b"sv), sha256_hex("a\0c"sv));
}

}  // namespace
}  // namespace nearpit
