// Formulas that the grammar can read and the formula language refuses, each with the whole sentence.
//
// A formula as typed; below it the code, the piece of text that is marked and the sentence; after = the formula with each
// of the offered fixes.

export const grammarRefusals = `
## two readings
a/b c
  ambiguous-product «a/b c» “a/b c” can be read as a/(b*c) or as a/b*c: write the one that is meant.
  = a/(b*c)
  = a/b*c
F_u*k/b t
  ambiguous-product «F_u*k/b t» “F_u*k/b t” can be read as F_u*k/(b*t) or as F_u*k/b*t: write the one that is meant.
  = F_u*k/(b*t)
  = F_u*k/b*t
a/-b c
  ambiguous-product «a/-b c» “a/-b c” can be read as a/(-b*c) or as a/-b*c: write the one that is meant.
  = a/(-b*c)
  = a/-b*c
1/2 x
  ambiguous-product «1/2 x» “1/2 x” can be read as 1/(2*x) or as 1/2*x: write the one that is meant.
  = 1/(2*x)
  = 1/2*x
1/2 x y
  ambiguous-product «1/2 x y» “1/2 x y” can be read as 1/(2*x*y) or as 1/2*x*y: write the one that is meant.
  = 1/(2*x*y)
  = 1/2*x*y
-1/2 (a + b)
  ambiguous-product «-1/2 (a + b)» “-1/2 (a + b)” can be read as -1/(2*(a + b)) or as -1/2*(a + b): write the one that is meant.
  = -1/(2*(a + b))
  = -1/2*(a + b)
a b/c
  ambiguous-product «a b/c» “a b/c”: beside a / no * is left out; write a*b/c.
  = a*b/c
2 x/3
  ambiguous-product «2 x/3» “2 x/3”: beside a / no * is left out; write 2*x/3.
  = 2*x/3
a*b c/d
  ambiguous-product «b c/d» “b c/d”: beside a / no * is left out; write b*c/d.
  = a*b*c/d
not a < b
  ambiguous-not «not a < b» “not a < b” can be read as not (a < b) or as (not a) < b: write the one that is meant.
  = not (a < b)
  = (not a) < b
not a + b >= c == d
  ambiguous-not «not a + b >= c == d» “not a + b >= c == d” can be read as not (a + b >= c == d) or as (not a) + b >= c == d: write the one that is meant.
  = not (a + b >= c == d)
  = (not a) + b >= c == d
not a + b >= c
  ambiguous-not «not a + b >= c» “not a + b >= c” can be read as not (a + b >= c) or as (not a) + b >= c: write the one that is meant.
  = not (a + b >= c)
  = (not a) + b >= c
e^mu theta
  ambiguous-product «e^mu theta» “e^mu theta” can be read as e^(mu*theta) or as e^mu*theta: write the one that is meant.
  = e^(mu*theta)
  = e^mu*theta
e^-mu theta_1 F
  ambiguous-product «e^-mu theta_1 F» “e^-mu theta_1 F” can be read as e^(-mu*theta_1*F) or as e^-mu*theta_1*F: write the one that is meant.
  = e^(-mu*theta_1*F)
  = e^-mu*theta_1*F
2^a^b c d
  ambiguous-product «2^a^b c d» “2^a^b c d” can be read as 2^a^(b*c*d) or as 2^a^b*c*d: write the one that is meant.
  = 2^a^(b*c*d)
  = 2^a^b*c*d
x^2²
  ambiguous-power «x^2²» “x^2²” can be read as (x^2)^2 or as x^(2^2): write the one that is meant.
x²^3
  ambiguous-power «x²^3» “x²^3” can be read as (x^2)^3 or as x^(2^3): write the one that is meant.
2e
  unfinished-power-of-ten «2e» “2e” can be read as an unfinished power of ten or as 2 times the constant e: write 2e3 or 2*e.
  = 2*e
2e - x
  unfinished-power-of-ten «2e» “2e” can be read as an unfinished power of ten or as 2 times the constant e: write 2e3 or 2*e.
  = 2*e - x

## logarithms, powers and other functions
log(x)
  unknown-function «log(x)» “log” does not say which logarithm: write ln(x) or log10(x).
  = ln(x)
  = log10(x)
2*log(x + 1)
  unknown-function «log(x + 1)» “log” does not say which logarithm: write ln(x + 1) or log10(x + 1).
  = 2*ln(x + 1)
  = 2*log10(x + 1)
log(x, b + 1)
  unknown-function «log(x, b + 1)» There is no function “log”: write ln(x)/ln(b + 1).
  = ln(x)/ln(b + 1)
log2(x)
  unknown-function «log2(x)» There is no function “log2”: write ln(x)/ln(2).
  = ln(x)/ln(2)
lg(x)
  unknown-function «lg(x)» There is no function “lg”: write log10(x).
  = log10(x)
pow(a + 1, b)*3
  unknown-function «pow(a + 1, b)» There is no function “pow”: write (a + 1)^b.
  = ((a + 1)^b)*3
pow(f(x), 2)
  unknown-function «f(x)» “f(x)” reads as a call of a function “f”, which does not exist: write f*(x) for the product.
  = pow(f*(x), 2)
root(x, 3)
  unknown-function «root(x, 3)» There is no function “root”: write x^(1/3).
  = x^(1/3)
arcsin(x)
  unknown-function «arcsin(x)» There is no function “arcsin”: write asin(x).
  = asin(x)
cot(x)
  unknown-function «cot(x)» There is no function “cot”: write 1/tan(x).
  = 1/tan(x)
mod(a, b + 1)
  unknown-function «mod(a, b + 1)» There is no function “mod”: write a - (b + 1)*floor(a/(b + 1)).
  = a - (b + 1)*floor(a/(b + 1))
sgn(x)
  unknown-function «sgn(x)» There is no function “sgn”: write sign(x).
  = sign(x)
if(a < b, 1, 2)
  unknown-function «if(a < b, 1, 2)» There is no function “if”: write (a < b) ? 1 : 2.
  = (a < b) ? 1 : 2
IF(a < b, 1, 2)*2
  unknown-function «IF(a < b, 1, 2)» There is no function “IF”: write (a < b) ? 1 : 2.
  = ((a < b) ? 1 : 2)*2
Sqrt(x)
  small-letters «Sqrt» “Sqrt”: functions are written in small letters; write sqrt.
  = sqrt(x)
SIN(x)
  small-letters «SIN» “SIN”: functions are written in small letters; write sin.
  = sin(x)
sqrrt(x)
  unknown-function «sqrrt(x)» “sqrrt(x)” reads as a call of a function “sqrrt”, which does not exist: write sqrrt*(x) for the product, or sqrt(x) for the function.
  = sqrrt*(x)
  = sqrt(x)
cosin(x)
  unknown-function «cosin(x)» “cosin(x)” reads as a call of a function “cosin”, which does not exist: write cosin*(x) for the product, or sin(x) for the function.
  = cosin*(x)
  = sin(x)
f(x, y)
  unknown-function «f» There is no function “f”: leave it out or write the formula itself.
f()
  unknown-function «f» There is no function “f”: leave it out or write the formula itself.
log()
  unknown-function «log» There is no function “log”: write log10.
  = log10()
toString(x)
  unknown-function «toString(x)» “toString(x)” reads as a call of a function “toString”, which does not exist: write toString*(x) for the product.
  = toString*(x)
__proto__(x)
  not-a-name «_» A name begins with a letter, not with “_”: write a letter before it.

## products that look like calls
a (b + c)
  unknown-function «a (b + c)» “a (b + c)” reads as a call of a function “a”, which does not exist: write a*(b + c) for the product.
  = a*(b + c)
a(b)
  unknown-function «a(b)» “a(b)” reads as a call of a function “a”, which does not exist: write a*(b) for the product.
  = a*(b)
pi (d + t)
  unknown-function «pi (d + t)» “pi (d + t)” reads as a call of a function “pi”, which does not exist: write pi*(d + t) for the product.
  = pi*(d + t)
e(x)
  unknown-function «e(x)» “e(x)” reads as a call of a function “e”, which does not exist: write e*(x) for the product.
  = e*(x)
F_1 (b)
  unknown-function «F_1 (b)» “F_1 (b)” reads as a call of a function “F_1”, which does not exist: write F_1*(b) for the product.
  = F_1*(b)
μ (a)
  unknown-function «μ (a)» “μ (a)” reads as a call of a function “μ”, which does not exist: write μ*(a) for the product.
  = μ*(a)
(a)(b)(c) d(x)
  unknown-function «d(x)» “d(x)” reads as a call of a function “d”, which does not exist: write d*(x) for the product.
  = (a)(b)(c) d*(x)

## functions without parentheses or with the wrong number of arguments
sin x
  function-without-parentheses «sin x» “sin x”: the argument of a function stands in parentheses; write sin(x).
  = sin(x)
2 sin x + 1
  function-without-parentheses «sin x» “sin x”: the argument of a function stands in parentheses; write sin(x).
  = 2 sin(x) + 1
sin 2 x
  function-without-parentheses «sin» “sin” is a function and needs its argument in parentheses: write sin(x).
sin x/2
  function-without-parentheses «sin» “sin” is a function and needs its argument in parentheses: write sin(x).
sin
  function-without-parentheses «sin» “sin” is a function and needs its argument in parentheses: write sin(x).
sin + 1
  function-without-parentheses «sin» “sin” is a function and needs its argument in parentheses: write sin(x).
max a
  function-without-parentheses «max» “max” is a function and needs its arguments in parentheses: write max(a, b).
sin^2(x)
  function-without-parentheses «sin^2(x)» “sin^2(x)”: the power stands after the parentheses; write sin(x)^2.
  = sin(x)^2
entry
  function-without-parentheses «entry» “entry” is a function: write entry(table, column, key).
sqrt(1,5)
  wrong-arguments «sqrt(1,5)» “sqrt(1,5)”: sqrt takes one argument, two are given; in a formula the decimal sign is a point, write sqrt(1.5).
  = sqrt(1.5)
sqrt(a, b)
  wrong-arguments «sqrt(a, b)» “sqrt(a, b)”: sqrt takes one argument, two are given; write sqrt(x).
sqrt()
  wrong-arguments «sqrt()» “sqrt()”: sqrt takes one argument, none is given; write sqrt(x).
max(a)
  wrong-arguments «max(a)» “max(a)”: max takes at least two arguments, one is given; write max(a, b).
atan2(y)
  wrong-arguments «atan2(y)» “atan2(y)”: atan2 takes two arguments, one is given; write atan2(y, x).
atan2(a, b, c)
  wrong-arguments «atan2(a, b, c)» “atan2(a, b, c)”: atan2 takes two arguments, three are given; write atan2(y, x).
hypot(a)
  wrong-arguments «hypot(a)» “hypot(a)”: hypot takes at least two arguments, one is given; write hypot(a, b).
entry(t, c)
  wrong-arguments «entry(t, c)» “entry(t, c)”: entry takes three arguments, two are given; write entry(table, column, key).
interpolate(t)
  wrong-arguments «interpolate(t)» “interpolate(t)”: interpolate takes three arguments, one is given; write interpolate(table, column, x).
entry("t", c, k)
  wrong-arguments «"t"» “"t"”: the name of a table stands without quotation marks; write t.
  = entry(t, c, k)
entry(t, "mu dry", k)
  wrong-arguments «entry(t, "mu dry", k)» “entry(t, "mu dry", k)”: the column in entry is a plain word; write entry(table, column, key).
entry(t, 1 + c, k)
  wrong-arguments «entry(t, 1 + c, k)» “entry(t, 1 + c, k)”: the column in entry is a plain word; write entry(table, column, key).

## missing and superfluous parts
a +
  value-missing «+» The formula ends after “+”: write the value that follows.
a + * b
  value-missing «+ *» A value is missing between “+” and “*”: write a name, a number or a quantity in quotation marks there.
* a
  value-missing «*» A value is missing before “*”: write a name, a number or a quantity in quotation marks there.
a and
  value-missing «and» The formula ends after “and”: write the value that follows.
or a
  value-missing «or» A value is missing before “or”: write a name, a number or a quantity in quotation marks there.
a not b
  operator-missing «a not» Between “a” and “not” the word “and” or “or” is missing: write it.
()
  value-missing «()» The parentheses are empty: write a value between them.
a + ()
  value-missing «()» The parentheses are empty: write a value between them.
f(,)
  value-missing «(,» A value is missing between “(” and “,”: write a name, a number or a quantity in quotation marks there.
max(a,)
  value-missing «,)» A value is missing between “,” and “)”: write a name, a number or a quantity in quotation marks there.
max(,a)
  value-missing «(,» A value is missing between “(” and “,”: write a name, a number or a quantity in quotation marks there.
(a
  parenthesis-not-closed «(» The parenthesis that opens at “(a” is not closed: write the “)” that belongs to it.
  = (a)
max(a, (b
  parenthesis-not-closed «(» The parenthesis that opens at “(b” is not closed: write the “)” that belongs to it.
  = max(a, (b))
a)
  parenthesis-not-opened «)» This “)” closes nothing: leave it out, or write the “(” that it closes.
  = a
(a, b)
  stray-comma «,» A comma stands only between the arguments of a function: leave it out, or write the function before the parentheses.
a, b
  stray-comma «,» A comma stands only between the arguments of a function: leave it out, or write the function before the parentheses.
"10 m
  quote-not-closed «"10 m» The quotation mark at "10 m is not closed: write " after the quantity.
  = "10 m"
‘10 m
  quote-not-closed «‘10 m» The quotation mark at ‘10 m is not closed: write ' after the quantity.
  = ‘10 m'
a "b"
  operator-missing «a "b"» Between “a” and “"b"” an operator is missing: write * for a product.
  = a*"b"
"a" 2
  operator-missing «"a" 2» Between “"a"” and “2” an operator is missing: write * for a product.
  = "a"*2
"a" "b"
  operator-missing «"a" "b"» Between “"a"” and “"b"” an operator is missing: write * for a product.
  = "a"*"b"
x^2 3
  operator-missing «2 3» Between “2” and “3” an operator is missing: write * for a product.
  = x^2*3
a ? b
  choice-unfinished «?» This “?” begins a choice that has no “:”: write test ? this : that.
a ? b : c : d
  stray-colon «:» A “:” stands only in a choice: write test ? this : that.
a ? b ? c : d : f
  choice-in-choice «? c : d : f» A choice before the “:” of another stands in parentheses: write test ? (test ? this : that) : other.
a ? : b
  value-missing «? :» A value is missing between “?” and “:”: write a name, a number or a quantity in quotation marks there.
²
  nothing-to-raise «²» The superscript “²” has nothing before it to raise: put a value there.
a + ²
  nothing-to-raise «²» The superscript “²” has nothing before it to raise: put a value there.
a < not
  value-missing «not» The formula ends after “not”: write the value that follows.
(2 3)
  operator-missing «2 3» Between “2” and “3” an operator is missing: write * for a product.
  = (2*3)
`;
