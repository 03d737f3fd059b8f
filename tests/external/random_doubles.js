// Prints the SHA-256 that "canonical numbers: random doubles" in canonical_json_test.cpp expects, from Node's own
// Number.prototype.toString:   node tests/external/random_doubles.js
// The generator is std::mt19937_64 (Nishimura and Matsumoto; C++ standard, rand.predef), written out again here.
'use strict';
const mask = (1n << 64n) - 1n;
const state = [20261201n];
for (let i = 1; i < 312; i++) {
    const last = state[i - 1];
    state.push((6364136223846793005n * (last ^ (last >> 62n)) + BigInt(i)) & mask);
}
let at = 312;
function next() {
    if (at === 312) {
        for (let i = 0; i < 312; i++) {
            const x = (state[i] & 0xffffffff80000000n) | (state[(i + 1) % 312] & 0x7fffffffn);
            state[i] = state[(i + 156) % 312] ^ (x >> 1n) ^ (x & 1n ? 0xb5026f5aa96619e9n : 0n);
        }
        at = 0;
    }
    let x = state[at++];
    x ^= (x >> 29n) & 0x5555555555555555n;
    x ^= (x << 17n) & 0x71d67fffeda60000n;
    x ^= (x << 37n) & 0xfff7eee000000000n;
    return x ^ (x >> 43n);
}
const double = (bits) => new Float64Array(new BigUint64Array([bits]).buffer)[0];

// 20,000 of any size, then 20,000 between 2^-25 and 2^75, around the sizes where the layout changes.
const texts = [];
while (texts.length < 20000) {
    const number = double(next());
    if (Number.isFinite(number)) texts.push(number.toString());
}
while (texts.length < 40000) {
    const bits = next();
    texts.push(double((bits & 0x800fffffffffffffn) | ((998n + ((bits >> 52n) & 0x7ffn) % 100n) << 52n)).toString());
}
console.log(require('crypto').createHash('sha256').update(texts.join('\n')).digest('hex'));
