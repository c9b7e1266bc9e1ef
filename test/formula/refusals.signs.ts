// Signs, words, letters and numbers that belong to no formula, each with the whole sentence; written as refusals.grammar.ts.

export const signRefusals = String.raw`
## signs that belong to values
5 %
  percent-in-formula «5 %» “5 %”: % belongs to values, not to formulas; write "5 %" in quotation marks, or make it a given.
  = "5 %"
0.5%*a
  percent-in-formula «0.5%» “0.5%”: % belongs to values, not to formulas; write "0.5 %" in quotation marks, or make it a given.
  = "0.5 %"*a
a % b
  percent-in-formula «%» “%” belongs to values, not to formulas: give the quantity the unit % and use its name here.
a%
  percent-in-formula «%» “%” belongs to values, not to formulas: give the quantity the unit % and use its name here.
30°
  degree-sign «30°» “30°”: a quantity inside a formula stands in quotation marks; write "30 deg".
  = "30 deg"
sin(30°)
  degree-sign «30°» “30°”: a quantity inside a formula stands in quotation marks; write "30 deg".
  = sin("30 deg")
20 °C
  degree-sign «20 °C» “20 °C”: a quantity inside a formula stands in quotation marks; write "20 degC".
  = "20 degC"
T°
  degree-sign «°» “°” belongs to values, not to formulas: give the angle the unit deg and use its name here.
10 ± 1
  tolerance-in-formula «±» “±” belongs to values, not to formulas: write the tolerance in the value of the given.
10″
  prime «″» “″” is not part of formulas: write a length in feet and inches or an angle in minutes as a quantity in quotation marks, such as "10 in".
5 "m"
  number-outside-quotes «5 "m"» “5 "m"”: the number of a quoted quantity stands inside the quotation marks; write "5 m".
  = "5 m"
a "m"
  operator-missing «a "m"» Between “a” and “"m"” an operator is missing: write * for a product.
  = a*"m"
10 in
  unit-in-formula «10 in» “10 in”: a quantity inside a formula stands in quotation marks; write "10 in".
  = "10 in"
10 in + 2
  unit-in-formula «10 in» “10 in”: a quantity inside a formula stands in quotation marks; write "10 in".
  = "10 in" + 2

## signs of other notations
a**b
  other-sign «**» “**” is not part of formulas: for a power write ^.
  = a^b
a .* b
  other-sign «.*» “.*” is not part of formulas: for a product write *.
  = a * b
a ./ b
  other-sign «./» “./” is not part of formulas: for a quotient write /.
  = a / b
a .^ b
  other-sign «.^» “.^” is not part of formulas: for a power write ^.
  = a ^ b
a // b
  other-sign «//» “//” is not part of formulas: for a quotient write /.
  = a / b
a <> b
  other-sign «<>» “<>” is not part of formulas: for “not equal” write !=.
  = a != b
a =< b
  other-sign «=<» “=<” is not part of formulas: for “at most” write <=.
  = a <= b
a => b
  other-sign «=>» “=>” is not part of formulas: for “at least” write >=.
  = a >= b
a && b
  other-sign «&&» “&&” is not part of formulas: for “and” write and.
  = a and b
a & b
  other-sign «&» “&” is not part of formulas: for “and” write and.
  = a and b
a || b
  other-sign «||» “||” is not part of formulas: for “or” write or.
  = a or b
a | b
  other-sign «|» “|” is not part of formulas: write abs(x) for the absolute value, or the word or between conditions.
|a - b|*2
  other-sign «|a - b|» “|a - b|”: bars are not part of formulas: for the absolute value write abs(a - b).
  = abs(a - b)*2
2 |a|
  other-sign «|a|» “|a|”: bars are not part of formulas: for the absolute value write abs(a).
  = 2 *abs(a)
!a
  other-sign «!» “!” is not part of formulas: for “not” write not.
  = not a
a!
  not-in-formulas «!» “!” is not part of formulas, which have no factorial: write the product, such as 1*2*3.
~a
  not-in-formulas «~» “~” is not part of formulas: write - for a change of sign or not for logic.
a << 2
  not-in-formulas «<<» “<<” is not part of formulas, which have no shifts of bits: leave it out.
a >> 2
  not-in-formulas «>>» “>>” is not part of formulas, which have no shifts of bits: leave it out.
a >>> 2
  not-in-formulas «>>>» “>>>” is not part of formulas, which have no shifts of bits: leave it out.
a ^| b
  not-in-formulas «^|» “^|” is not part of formulas, which have no operations on bits: leave it out.
a ?? b
  not-in-formulas «??» “??” is not part of formulas, which have no replacements for missing values: leave it out.
a?.b
  not-in-formulas «?.» “?.” is not part of formulas, which have no members of objects: leave it out.
a xor b
  not-in-formulas «xor» “xor” is not part of formulas: write (a or b) and not (a and b).
  = ((a or b) and not (a and b))
a mod 3
  not-in-formulas «mod» “mod” is not part of formulas: write a - 3*floor(a/3).
  = (a - 3*floor(a/3))
(a + 1) mod b
  not-in-formulas «mod» “mod” is not part of formulas: write a - b*floor(a/b).
a to b
  conversion-in-formula «to» “to” converts no units here: units follow by themselves, and the unit of the result stands in the unit field of the line.
a in b
  conversion-in-formula «in» “in” converts no units here: units follow by themselves, and the unit of the result stands in the unit field of the line.
[a + b]*c
  other-sign «[a + b]» “[a + b]”: formulas have parentheses only; write (a + b).
  = (a + b)*c
{a + b}
  other-sign «{a + b}» “{a + b}”: formulas have parentheses only; write (a + b).
  = (a + b)
a[1]
  not-in-formulas «[» “[” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.
[1, 2]
  not-in-formulas «[» “[” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.
[a
  not-in-formulas «[» “[” is not part of formulas, which have no lists and no indices: write parentheses, and names such as F_1 for numbered quantities.
a]
  parenthesis-not-opened «]» This “]” closes nothing: formulas have parentheses only.
a; b
  not-in-formulas «;» “;” is not part of formulas: a formula is one expression, and the arguments of a function are separated by commas.
a.b
  point-in-name «a.b» “a.b”: a name holds no point; write a_b for a subscript.
  = a_b
a . b
  point-in-name «.» This point belongs to no number: write a digit beside it, or leave it out.
a.5
  point-in-name «a.5» “a.5”: a name holds no point; write a_5 for a subscript.
  = a_5
.
  point-in-name «.» This point belongs to no number: write a digit beside it, or leave it out.
a = b
  equals-sign «=» “a = b”: a formula is the right-hand side alone, the name belongs to the line: write b, or == to compare.
  = b
  = a == b
F = m*a
  equals-sign «=» “F = m*a”: a formula is the right-hand side alone, the name belongs to the line: write m*a, or == to compare.
  = m*a
  = F == m*a
F := m*a
  equals-sign «:=» “F := m*a”: a formula is the right-hand side alone, the name belongs to the line: write m*a, or == to compare.
  = m*a
  = F == m*a
F_1 + F_2 = 3
  equals-sign «=» “=” is not part of a formula, which is the right-hand side alone: write == to compare.
  = F_1 + F_2 == 3
a : b
  stray-colon «:» A “:” stands only in a choice: write test ? this : that.
1:10
  stray-colon «:» A “:” stands only in a choice: write test ? this : that.
√2
  other-sign «√2» “√2” is not part of formulas: write sqrt(2).
  = sqrt(2)
2√(a + b)
  other-sign «√» “√” is not part of formulas: write sqrt(…).
  = 2*sqrt(a + b)
∛x
  other-sign «∛x» “∛x” is not part of formulas: write cbrt(x).
  = cbrt(x)
√
  other-sign «√» “√” is not part of formulas: write sqrt(x).
½ m
  other-sign «½» “½” is not part of formulas: write (1/2).
  = (1/2) m
2½
  other-sign «½» “½” is not part of formulas: write (1/2).
  = 2*(1/2)
∞
  not-in-formulas «∞» “∞” is not part of formulas: write the formula of the limit case.
a'
  prime «a'» “a'”: a name has no prime: give it a subscript, such as a_p.
  = a_p
F_1'
  prime «F_1'» “F_1'”: a name has no prime: give it a subscript, such as F_1p.
  = F_1p
'
  quote-not-closed «'» The quotation mark at ' is not closed: write ' after the quantity.
x″
  prime «x″» “x″”: a name has no prime: give it a subscript, such as x_p.
  = x_p
# note
  not-in-formulas «#» “#” is not part of formulas: a remark belongs in the title or in a note.
$x
  unknown-sign «$» “$” is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.
@
  unknown-sign «@» “@” is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.
a \ b
  unknown-sign «\» “\” is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.
_x
  not-a-name «_» A name begins with a letter, not with “_”: write a letter before it.
😀
  unknown-sign «😀» “😀” is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.
٣
  unknown-sign «٣» “٣” is not part of formulas: use + - * / ^, parentheses, names, numbers and quantities in quotation marks.

## words that are no names
true
  not-in-formulas «true» “true” is not part of formulas: write the comparison itself, such as v > v_max.
a == false
  not-in-formulas «false» “false” is not part of formulas: write the comparison itself, such as v > v_max.
null
  not-in-formulas «null» “null” is not part of formulas, a formula always has a value: leave it out.
undefined
  not-in-formulas «undefined» “undefined” is not part of formulas, a formula always has a value: leave it out.
NaN
  not-in-formulas «NaN» “NaN” is not part of formulas, a formula always has a value: leave it out.
Infinity
  not-in-formulas «Infinity» “Infinity” is not part of formulas: write the formula of the limit case, or a choice, test ? this : that.
end
  not-in-formulas «end» “end” is reserved and cannot name a quantity: choose another name, such as end_1.
a AND b
  small-letters «AND» “AND”: the words and, or, not are written in small letters; write and.
  = a and b
Not a
  small-letters «Not» “Not”: the words and, or, not are written in small letters; write not.
  = not a

## letters and characters
а + 1
  look-alike-letter «а» “а” (U+0430) is a Cyrillic letter that looks like a: type the Latin a.
  = a + 1
Р*2
  look-alike-letter «Р» “Р” (U+0420) is a Cyrillic letter that looks like P: type the Latin P.
  = P*2
ж
  unknown-letter «ж» The letter “ж” (U+0436) cannot stand in a name: names are written in Latin or Greek letters, digits and _.
ạ
  unknown-letter «ạ» The letter “ạ” (U+1EA1) cannot stand in a name: names are written in Latin or Greek letters, digits and _.
日
  unknown-letter «日» The letter “日” (U+65E5) cannot stand in a name: names are written in Latin or Greek letters, digits and _.
x̣
  unknown-letter «x̣» “x̣” holds an accent that belongs to no letter: write the name without it.

## numbers
1 500
  digits-apart «1 500» “1 500” reads as two numbers: in a formula digits stand together, write 1500.
  = 1500
1 5
  operator-missing «1 5» Between “1” and “5” an operator is missing: write * for a product.
  = 1*5
1,5
  decimal-comma «1,5» “1,5”: in a formula the decimal sign is a point; write 1.5.
  = 1.5
2*1,5 + a
  decimal-comma «1,5» “1,5”: in a formula the decimal sign is a point; write 1.5.
  = 2*1.5 + a
(1,5)
  decimal-comma «1,5» “1,5”: in a formula the decimal sign is a point; write 1.5.
  = (1.5)
1.2.3
  two-decimal-points «1.2.3» “1.2.3” has two decimal points: write one number.
1e400
  number-out-of-range «1e400» “1e400” is beyond the numbers that can be computed (about 1e-308 to 1e308): choose a larger or smaller unit.
1e-400
  number-out-of-range «1e-400» “1e-400” is beyond the numbers that can be computed (about 1e-308 to 1e308): choose a larger or smaller unit.
0x1F
  not-decimal «0x1F» “0x1F”: numbers are decimal here; write 31.
  = 31
0b101
  not-decimal «0b101» “0b101”: numbers are decimal here; write 5.
  = 5
`;
