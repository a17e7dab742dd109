#!/usr/bin/python3
# SPDX-License-Identifier: GPL-3.0-or-later
"""The check of the layout finds each kind of breach when it is planted, and nothing in a house that is in order."""
import pathlib
import sys
import tempfile
import unittest

sys.path.insert(0, str(pathlib.Path(__file__).parent))
import layout  # noqa: E402

LICENCE = "// SPDX-License-Identifier: GPL-3.0-or-later\n"


class LayoutTest(unittest.TestCase):
    def breaches(self, name, text):
        with tempfile.TemporaryDirectory() as folder:
            top = pathlib.Path(folder)
            (top / "core").mkdir()
            path = top / name
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_text(text, encoding="utf-8")
            return list(layout.breaches(top))

    def test_nothing_in_order(self):
        self.assertEqual(self.breaches("core/fit/a.cpp", LICENCE + '#include "core/numeric/tails.h"\n'), [])
        self.assertEqual(self.breaches("app/score/a.h", LICENCE + "#include <QWidget>\n"), [])

    def test_each_breach(self):
        planted = {
            "core/fit/a.cpp": "#include <QString>\n",
            "core/fit/b.cpp": '#include "core/book/model.h"\n',
            "core/book/c.cpp": '#include "core/fit/goodness_of_fit.h"\n',
            "core/fit/d.h": "#include <boost/math/distributions.hpp>\n",
            "core/ratio/e.cpp": '#include "app/common/text.h"\n',
            "app/score/f.cpp": "#include <boost/math/distributions.hpp>\n",
            "tests/app/g.cpp": "    QCOMPARE(1, 2);\n",
            "tests/app/h.cpp": "    GTEST_SKIP() << 1;\n",
            "tests/fit/i.cpp": "int x;\n" * 500,
            "scripts/j.cpp": "",
            "core/extra/k.cpp": "",
        }
        for name, text in planted.items():
            with self.subTest(name):
                self.assertEqual(len(self.breaches(name, LICENCE + text)), 1)

    def test_no_licence_line(self):
        self.assertEqual(self.breaches("core/fit/a.cpp", "int x;\n"), ["core/fit/a.cpp:1: no licence line"])


if __name__ == "__main__":
    unittest.main()
