"""Text to tree: what stands where, every mistake at its place, and no text that exhausts anything."""

from __future__ import annotations

import ast

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.errors import ExpressionError
from uq.lang.parser import RESERVED, parse
from uq.lang.tokens import MAX_LENGTH
from uq.lang.tree import BINARY, Tree, fold, names, parts, same_tree, to_text

Shape = tuple[object, ...]

LEAVES = st.sampled_from(["x", "y", "k0", "T_off", "1", "2.5", "1e-3", "1_000.25"])
ARITHMETIC = ("+", "-", "*", "/", "**")


def shape(tree: Tree) -> Shape:
    return fold(tree, lambda part, args: (part.op, part.name, part.value, *args))


@st.composite
def arithmetic(draw: st.DrawFn, depth: int = 4) -> str:
    """Text of numbers, names, operators and brackets, with brackets left out at random."""
    if depth == 0 or draw(st.booleans()):
        return draw(LEAVES)
    inner = [draw(arithmetic(depth=depth - 1)) for _ in range(2)]
    form = draw(st.sampled_from(["{0} {op} {1}", "({0}) {op} {1}", "{0}{op}({1})", "-{0}", "-({0})", "sin({0})", "max({0}, {1})"]))
    return form.format(*inner, op=draw(st.sampled_from(ARITHMETIC)))


@st.composite
def anything(draw: st.DrawFn, depth: int = 4) -> Tree:
    """A tree of every kind of part, as if parsed."""
    if depth == 0 or draw(st.integers(0, 3)) == 0:
        kind = draw(st.sampled_from(["number", "name", "quantity"]))
        value = draw(st.floats(0, 1e300, allow_nan=False)) if kind != "name" else 0.0
        return Tree(kind, "", 0, 0, name={"number": "", "name": "lambda", "quantity": "kJ/kg/K"}[kind], value=value)
    op = draw(st.sampled_from([*BINARY, "neg", "not", "call"]))
    count = draw(st.integers(1, 3)) if op == "call" else 1 if op in ("neg", "not") else 2
    args = tuple(draw(anything(depth=depth - 1)) for _ in range(count))
    return Tree(op, "", 0, 0, args, name="where" if op == "call" else "")


def as_python_reads(text: str) -> Shape:
    """The same shape from Python's own grammar, which the language follows where both have an operator (read only, never evaluated)."""
    operators = {ast.Add: "+", ast.Sub: "-", ast.Mult: "*", ast.Div: "/", ast.Pow: "**"}

    def told(node: ast.expr) -> Shape:
        if isinstance(node, ast.BinOp):
            return (operators[type(node.op)], "", 0.0, told(node.left), told(node.right))
        if isinstance(node, ast.UnaryOp):
            return ("neg", "", 0.0, told(node.operand))
        if isinstance(node, ast.Call):
            assert isinstance(node.func, ast.Name)
            return ("call", node.func.id, 0.0, *map(told, node.args))
        if isinstance(node, ast.Name):
            return ("name", node.id, 0.0)
        assert isinstance(node, ast.Constant)
        return ("number", "", float(node.value))  # type: ignore[arg-type]

    return told(ast.parse(text, mode="eval").body)


def tree_or_mistake(text: str) -> Tree | ExpressionError:
    try:
        return parse(text)
    except ExpressionError as mistake:
        return mistake


@given(arithmetic())
def test_reads_arithmetic_as_python_does(text: str) -> None:
    assert shape(parse(text)) == as_python_reads(text)


@given(anything())
def test_text_and_tree_are_the_same(tree: Tree) -> None:
    text = to_text(tree)
    again = parse(text)
    assert same_tree(again, tree)
    assert to_text(again) == text


@given(st.text(alphabet=st.sampled_from("ab1.e_ ()+-*/<>=,'\"andortK^[]é²−\t"), max_size=40))
def test_any_text_gives_a_tree_or_a_mistake_within_it(text: str) -> None:
    read = tree_or_mistake(text)
    if isinstance(read, Tree):
        assert same_tree(parse(to_text(read)), read)
    else:
        assert 0 <= read.offset <= len(text)
        assert read.length >= 1
        assert read.found
        assert read.expected


@pytest.mark.parametrize(
    ("text", "bracketed"),
    [
        ("-x**2", "-(x ** 2)"),
        ("2**-x**2", "2 ** (-(x ** 2))"),
        ("a**b**c", "a ** (b ** c)"),
        ("a - b - c", "(a - b) - c"),
        ("a / b * c", "(a / b) * c"),
        ("not a < b and c < d or e < f", "((not (a < b)) and (c < d)) or (e < f)"),
        ("a + b < c * d", "(a + b) < (c * d)"),
        ("- a * b", "(-a) * b"),
    ],
)
def test_binding(text: str, bracketed: str) -> None:
    assert same_tree(parse(text), parse(bracketed))


def test_pythons_keywords_are_names() -> None:
    assert names(parse("lambda * class - None + import")) == (("lambda", 0), ("class", 9), ("None", 17), ("import", 24))


def test_names_come_with_their_places_and_without_functions() -> None:
    assert names(parse("exp(-k * time) + pi * k")) == (("k", 5), ("time", 9), ("k", 22))


def test_parts_know_their_text() -> None:
    tree = parse("heat  - (loss +\n '3 kJ')* 2")
    assert tree.args[1].text == "(loss + '3 kJ')* 2"
    assert [part.text for part in parts(tree)] == [
        "heat",
        "loss",
        "'3 kJ'",
        "(loss + '3 kJ')",
        "2",
        "(loss + '3 kJ')* 2",
        "heat - (loss + '3 kJ')* 2",
    ]
    assert len(parse("+".join(["abc"] * 100)).text) <= 60


def test_quantities_take_either_quote() -> None:
    tree = parse("value_at(x, \"60 min\") - '-1.5e3 kJ/kg/K'")
    assert [(part.value, part.name) for part in parts(tree) if part.op == "quantity"] == [(60.0, "min"), (-1500.0, "kJ/kg/K")]


def test_the_languages_own_words_are_reserved() -> None:
    assert {"exp", "where", "highest", "first_time", "time", "pi", "log", "and"} <= RESERVED


@pytest.mark.parametrize(
    "text",
    [
        "-" * 3000 + "x",
        "(" * 5000,
        "(" * 101 + "x" + ")" * 101,
        "sin(" * 2000 + "x" + ")" * 2000,
        "not " * 2400 + "x",
        "2**" * 3000 + "2",
        "2**-" * 2000 + "2",
        "a or b and c < d + e * f ** (" * 300 + "x" + ")" * 300,
    ],
)
def test_depth_is_bounded(text: str) -> None:
    with pytest.raises(ExpressionError, match="at most 100") as caught:
        parse(text)
    assert "[terms]" in caught.value.remedy


def test_ninety_nine_levels_are_fine_whatever_stands_between() -> None:
    tree = parse("a or b and c < d + e * f * (" * 99 + "x" + ")" * 99)
    assert same_tree(parse(to_text(tree)), tree)


def test_length_is_bounded() -> None:
    assert parse("x" * MAX_LENGTH).name == "x" * MAX_LENGTH
    with pytest.raises(ExpressionError, match="10001 characters") as caught:
        parse("x" * (MAX_LENGTH + 1))
    assert caught.value.offset == MAX_LENGTH


@pytest.mark.parametrize("operator", ["+", "-", "*", "/", " or ", " and "])
def test_flat_texts_may_be_as_long_as_allowed(operator: str) -> None:
    count = MAX_LENGTH // (1 + len(operator))
    tree = parse(operator.join(["x"] * count))
    assert len(names(tree)) == count
    assert same_tree(parse(operator.join(["x"] * count)), tree)
    assert len(to_text(tree)) > count


MISTAKES = [
    # text, offset, length, part of what was found, part of the remedy
    ("", 0, 1, "nothing", ""),
    ("   ", 0, 3, "nothing", ""),
    ("x^2", 1, 1, "`^`", "write **"),
    ("log(x)", 0, 3, "`log`", "ln for the natural logarithm, log10"),
    ("2*pow(x, 2)", 2, 3, "`pow`", "a ** b"),
    ("a < b < c", 6, 1, "second comparison", "a < b and b < c"),
    ("a < b >= c", 6, 2, "second comparison", "a < b and b < c"),
    ("a == b", 2, 2, "`==`", "compare with < or >"),
    ("a != b", 2, 2, "`!=`", "compare with < or >"),
    ("a = b", 2, 1, "`=`", "sets nothing"),
    ("a += b", 2, 2, "`+=`", "sets nothing"),
    ("a && b", 2, 2, "`&&`", "write and"),
    ("a | b", 2, 1, "`|`", "write or"),
    ("!a", 0, 1, "`!`", "write not"),
    ("a % b", 2, 1, "`%`", "mod(a, b)"),
    ("a // b", 2, 2, "`//`", "a / b"),
    ("C[cell*2]", 6, 1, "`*`", "an index plus or minus a whole number"),
    ("C[-1]", 2, 1, "`-`", "counted from 0"),
    ("C[]", 2, 1, "`]`", ""),
    ("C[cell-]", 7, 1, "`]`", "an index plus or minus a whole number"),
    ("C[1.5]", 2, 3, "`1.5`", "counted from 0"),
    ("C[cell-1", 8, 1, "the end of the text", "an index plus or minus a whole number"),
    ("(a + b)[1]", 7, 1, "`[` behind `(a + b)`", "behind the name of what goes over an index"),
    ("2 * [1]", 4, 1, "`[`", "behind the name of what goes over an index"),
    ("{x}", 0, 1, "`{`", "round brackets"),
    ("x if a else b", 2, 2, "`if`", "where(condition, a, b)"),
    ("a ? b : c", 2, 1, "`?`", "where(condition, a, b)"),
    ("x.real", 1, 1, "`.`", "no point"),
    ("_x", 0, 1, "`_`", "begins with a letter"),
    ("12 h", 3, 1, "`h` behind `12`", "'12 h' in quotes"),
    ("12h", 2, 1, "`h` behind `12`", "12 * h"),
    ("x y", 2, 1, "`y` behind `x`", "write x * y"),
    ("2 (x)", 2, 1, "`(`", "write *"),
    ("(a)(b)", 3, 1, "`(`", "write *"),
    ("(a", 0, 1, "without its partner", ""),
    ("exp(a", 0, 4, "`exp(` without its partner", ""),
    ("a)", 1, 1, "`)` without its partner", "missing before"),
    ("f()", 2, 1, "`)`", "nothing in the brackets"),
    ("()", 1, 1, "`)`", "nothing in the brackets"),
    ("f(a,)", 4, 1, "`)`", "comma"),
    ("f(,a)", 2, 1, "`,`", ""),
    ("1,5", 1, 1, "`,`", "decimal sign is a point"),
    ("(1,5)", 2, 1, "`,`", "decimal sign is a point"),
    ("+a", 0, 1, "`+`", "leave the sign away"),
    ("a * / b", 4, 1, "`/`", ""),
    ("a -", 3, 1, "the end", ""),
    ("a not b", 2, 3, "`not` behind `a`", ""),
    (".5 * x", 0, 2, "`.5`", "write 0.5"),
    ("1.", 0, 2, "`1.`", "write 1.0"),
    ("1__0", 0, 4, "`1__0`", "between digits"),
    ("1_", 0, 2, "`1_`", "between digits"),
    ("1e400", 0, 5, "`1e400`", ""),
    ("1e-400", 0, 6, "`1e-400`", ""),
    ("'3'", 0, 3, "'3'", "273.15 K"),
    ("'x'", 0, 3, "'x'", "without quotes"),
    ("2 * 'alarm K'", 4, 9, "'alarm K'", "273.15 K"),
    ("'3 K", 0, 1, "without its partner", "273.15 K"),
    ("2 '3 K'", 2, 5, "behind `2`", "write *"),
    ("α * x", 0, 1, "GREEK SMALL LETTER ALPHA", "as alpha"),
    ("x + а", 4, 1, "CYRILLIC SMALL LETTER A", "only looks like a plain `a`"),
    ("x²", 1, 1, "SUPERSCRIPT TWO", "write **2"),
    ("x − 1", 2, 1, "MINUS SIGN", "write -"),
    ("ｘ", 0, 1, "FULLWIDTH", "write x"),
    ("x ≤ 1", 2, 1, "LESS-THAN OR EQUAL", "write <="),
    ("x\u00a0+ 1", 1, 1, "NO-BREAK SPACE", "ordinary blank"),
    ("x\x00", 1, 1, "U+0000", ""),
    ("__import__('os')", 0, 1, "`_`", "begins with a letter"),
]


@pytest.mark.parametrize(("text", "offset", "length", "found", "remedy"), MISTAKES)
def test_mistakes(text: str, offset: int, length: int, found: str, remedy: str) -> None:
    with pytest.raises(ExpressionError) as caught:
        parse(text)
    mistake = caught.value
    assert (mistake.offset, mistake.length) == (offset, length)
    assert found in mistake.found
    assert remedy in mistake.remedy
    assert mistake.expected
