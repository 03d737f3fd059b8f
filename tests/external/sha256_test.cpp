#include <catch_amalgamated.hpp>
#include <string>

#include "core/decision/sha256.hpp"

namespace steelyard {

// NIST, FIPS 180-4 (2015), Secure Hash Standard, and its published example computations for SHA-256 (one
// block "abc", two blocks of 448 bits). The one million times "a" is from FIPS 180-2 (2002), appendix B.3.
// All from memory, each confirmed with GNU coreutils:  printf abc | sha256sum;  head -c 1000000 /dev/zero |
// tr '\0' a | sha256sum
TEST_CASE("sha256: the published examples") {
    CHECK(sha256_hex("abc") == "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    CHECK(sha256_hex("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq") ==
          "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1");
    CHECK(sha256_hex(std::string(1'000'000, 'a')) ==
          "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
}

// Computed with GNU coreutils:  printf '' | sha256sum
TEST_CASE("sha256: the empty text") {
    CHECK(sha256_hex("") == "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
}

// Computed with GNU coreutils:  head -c LENGTH /dev/zero | tr '\0' q | sha256sum
// The lengths lie around the end of a block of 64 bytes, of which the padding takes at least 9.
TEST_CASE("sha256: lengths around the end of a block") {
    struct {
        std::size_t length;
        const char* hex;
    } const cases[] = {
        {1, "8e35c2cd3bf6641bdb0e2050b76932cbb2e6034a0ddacc1d9bea82a6ba57f7cf"},
        {55, "85528b5baff5639cb8e7daca79d085ac29ac0978e873ed7527158616b2b6c379"},
        {56, "f8ce2f8d6990c639668fe404262f35ed72d8bb145ad6bae786af7284447386df"},
        {57, "243be04ce55d66163de2c19e9a13edbcea43775ecd0c28047f30338ea24a15af"},
        {63, "9b49777003a4143d8c3f4d3002eb631c6bda8b030a3ccc87f8a21d5f61c89e87"},
        {64, "ee8e658590c9a5e119400a774415a01db104de1ee6e2c29ec69aa73ef46544d2"},
        {65, "2b6c3f7f12b1b12fc5409626dc4e5302d8d37082cbeddea7755eac43aba039c8"},
        {119, "c8bc8a6e9626586bb888ad131d44ed2bd37fc608e902904ade3c566c4208e6ca"},
        {120, "77a2d49d72a11e41678c51f8f0cb67f5cb570f30370c3aeffe266a0d1ee43209"},
        {127, "bf378e224a9509327bde4009499f2fe0a210b26b0aa21d4c164b16f23363c817"},
        {128, "652713bcb795a6978fa84aa8d071d13e9ee581a8e716e8ab18daa49d1e920360"},
        {1000, "2e6bba1f3cf48fe45fa1c56e25b47fb622dde50eba1e17e0a72464e32bf4ab41"},
    };
    for (const auto& c : cases) {
        INFO(c.length << " bytes");
        CHECK(sha256_hex(std::string(c.length, 'q')) == c.hex);
    }
}

// Computed with GNU coreutils:  printf '\0\377\200\n' | sha256sum
TEST_CASE("sha256: bytes that are no text") {
    CHECK(sha256_hex(std::string("\0\xff\x80\n", 4)) ==
          "6d6f7836f1e146dc0204afb5133dae52fdc05603d8ac2dc793b481b0e0829fd1");
}

} // namespace steelyard
