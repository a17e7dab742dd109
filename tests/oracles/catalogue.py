# SPDX-License-Identifier: GPL-3.0-or-later
"""Enumerates gametes and zygotes of a cross, knowing alleles and groupings and no ratio.

Input rows: id, cross, linkage (empty: unlinked), grouping with ';' between its entries (empty: count genotypes).
Output rows: id, one "label=share=slope" a class (or genotype). The share is an exact fraction; with linkage it and its
slope by r are decimals of 17 digits, computed in exact fractions.

It works otherwise than the program does on purpose: a plant is a dictionary of letters to pairs, a gamete is chosen by
listing every way a meiosis can go, and a pattern is compared letter by letter.
"""
import csv
import itertools
import sys
from fractions import Fraction

HALF = Fraction(1, 2)


def read_plant(words):
    """A plant as (letters, strand one, strand two); None on a strand is a chromosome without the locus."""
    letters, one, two = [], [], []
    for word in words:
        if "/" in word:
            left, right = word.split("/")
            letters += [c.upper() for c in left]
            one += left
            two += right
        elif word[0] in "XZ" and len(word) >= 3 and word[1].upper() != word[0]:
            letters.append(word[1].upper() + "*")
            one.append(word[1])
            two.append(word[3] if len(word) == 4 else None)
        else:
            for a, b in zip(word[::2], word[1::2]):
                letters.append(a.upper())
                first, second = sorted([a, b])  # capitals sort first: coupling where no phase is typed
                one.append(first)
                two.append(second)
    return letters, dict(zip(letters, one)), dict(zip(letters, two))


def meiosis(plant, letters, r):
    """Every gamete of a plant with its probability."""
    strands = plant
    result = {}
    for start in (0, 1):
        for switches in itertools.product((False, True), repeat=len(letters) - 1):
            share, here, gamete = HALF, start, []
            for i, letter in enumerate(letters):
                if i:
                    free = letter.endswith("*") or letters[i - 1].endswith("*")
                    rate = HALF if free else r
                    share *= rate if switches[i - 1] else 1 - rate
                    here ^= switches[i - 1]
                gamete.append(strands[here][i])
            key = tuple(gamete)
            result[key] = result.get(key, 0) + share
    return result


def mate(eggs, pollen, weight, into):
    for (egg, p), (grain, q) in itertools.product(eggs.items(), pollen.items()):
        key = tuple(sorted((egg, grain), key=str))
        into[key] = into.get(key, 0) + weight * p * q


def spelled(zygote, letters, chromosome):
    """The genotype spelled out, locus by locus: 'Aa', 'XAXa', 'XAY'."""
    parts = []
    for i, letter in enumerate(letters):
        pair = sorted((a for a in (zygote[0][i], zygote[1][i]) if a is not None))
        if letter.endswith("*"):
            other = "Y" if chromosome == "X" else "W"
            parts.append(chromosome + pair[0] + (chromosome + pair[1] if len(pair) == 2 else other))
        else:
            parts.append("".join(pair))
    return parts


def fits_pair(pattern, pair):
    """'A_' takes in 'AA' and 'Aa'; also with chromosome letters between, since those must be equal."""
    if len(pattern) != len(pair):
        return False
    marks = [c for i, c in enumerate(pattern) if len(pattern) == 2 or i % 2 == 1 or (len(pattern) == 3 and i == 2)]
    wanted = [c for i, c in enumerate(pair) if len(pair) == 2 or i % 2 == 1 or (len(pair) == 3 and i == 2)]
    return any(all(m in ("_", w) for m, w in zip(order, wanted)) for order in itertools.permutations(marks))


def split_pattern(pattern, letters, chromosome):
    """Locus letter to its part of the pattern."""
    parts, i = {}, 0
    sexed = [l for l in letters if l.endswith("*")]
    while i < len(pattern):
        if sexed and pattern[i] == chromosome:
            size = 3 if pattern[i + 2] in "YW" else 4
            parts[sexed[0]] = pattern[i:i + size]
        else:
            size = 2
            if pattern[i:i + 2] != "__":
                parts[pattern[i].upper()] = pattern[i:i + 2]
        i += size
    return parts


def takes_in(pattern, parts_of_zygote, letters, chromosome):
    wanted = split_pattern(pattern, letters, chromosome)
    return all(fits_pair(wanted[letter], part) for letter, part in zip(letters, parts_of_zygote) if letter in wanted)


def label_of(zygote, entries, letters, chromosome):
    parts = spelled(zygote, letters, chromosome)
    found = {label for pattern, label in entries if takes_in(pattern, parts, letters, chromosome)}
    if len(found) > 1:
        raise SystemExit(f"{''.join(parts)} is in {found}")
    return found.pop() if found else None


def normalised(generation, keep):
    kept = {z: p for z, p in generation.items() if keep(z)}
    total = sum(kept.values())
    return {z: p / total for z, p in kept.items()}


def enumerate_cross(cross, r, entries):
    words = cross.replace("\u00d7", " x ").split()
    chromosome = "Z" if any(w[0] == "Z" and len(w) > 2 and w[1] != "z" for w in words) else "X"
    groups, steps = [[]], []
    i = 0
    while i < len(words):
        if words[i] == "x":
            groups.append([])
            steps.append("x")
        elif words[i] == "selfed":
            times = int(words[i + 1]) if i + 1 < len(words) and words[i + 1].isdigit() else 1
            i += i + 1 < len(words) and words[i + 1].isdigit()
            steps += ["selfed"] * times
        else:
            groups[-1].append(words[i])
        i += 1
    plants = [read_plant(group) for group in groups]
    letters = plants[0][0]
    strands = [(tuple(p[1][l] for l in letters), tuple(p[2][l] for l in letters)) for p in plants]
    population, others = {strands[0]: Fraction(1)}, iter(strands[1:])
    label = lambda z: label_of(z, entries, letters, chromosome)
    for step in steps:
        after = {}
        other = meiosis(next(others), letters, r) if step == "x" else None
        for plant, share in population.items():
            gametes = meiosis(plant, letters, r)
            mate(gametes, other if other else gametes, share, after)
        population = normalised(after, lambda z: label(z) != "dies")
    population = normalised(population, lambda z: label(z) != "left out")
    shares = {}
    for label_text in [l for _, l in entries if l not in ("dies", "left out")]:
        shares.setdefault(label_text, Fraction(0))
    for zygote, share in population.items():
        key = label(zygote) if entries else "".join(spelled(zygote, letters, chromosome))
        if key is None:
            raise SystemExit(f"{zygote} is in no class")
        shares[key] = shares.get(key, Fraction(0)) + share
    return shares


def decimal(value):
    return format(float(value), ".17g")


def main():
    print("id,classes")
    for row in csv.reader(sys.stdin):
        name, cross, linkage, show = row
        entries = [tuple(part.strip() for part in entry.split("=")) for entry in show.split(";") if entry.strip()]
        entries = [(pattern.replace(" ", ""), label) for pattern, label in entries]
        if not linkage:
            shares = enumerate_cross(cross, HALF, entries)
            cells = [f"{label}={share.numerator}/{share.denominator}=" for label, share in shares.items() if share or entries]
        else:
            # The shares are polynomials in r, or quotients of them: a difference over a tiny exact step has an error
            # far below a double's last digit.
            r, step = Fraction(float(linkage)), Fraction(1, 10**30)
            middle, low, high = (enumerate_cross(cross, x, entries) for x in (r, r - step, r + step))
            cells = [f"{l}={decimal(s)}={decimal((high[l] - low[l]) / (2 * step))}" for l, s in middle.items()]
        print(",".join([name] + cells))


main()
