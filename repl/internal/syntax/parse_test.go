package syntax

import (
	"strings"
	"testing"
)

func TestExpressions(t *testing.T) {
	reads(t, `
## precedence, from the left but for the power
1 + 2*3 => show (+ 1 (* 2 3))
1*2 + 3 => show (+ (* 1 2) 3)
1 - 2 - 3 => show (- (- 1 2) 3)
a/b/c => show (/ (/ a b) c)
a/b*c => show (* (/ a b) c)
2^3^2 => show (^ 2 (^ 3 2))
2^-3^2 => show (^ 2 (- (^ 3 2)))
-3^2 => show (- (^ 3 2))
(-3)^2 => show (^ (- 3) 2)
-a*b => show (* (- a) b)
a*-b => show (* a (- b))
a - -b => show (- a (- b))
--a => show (- (- a))
+a => show a
a + +b => show (+ a b)
(a + b)*c => show (* (+ a b) c)
((a)) => show a
a*(b + c)^2 => show (* a (^ (+ b c) 2))
r^10*a => show (* (^ r 10) a)
x² => show (^ x 2)
x⁻¹² => show (^ x -12)
a·b × c − d => show (- (* (* a b) c) d)
a\t+\tb => show (+ a b)
## a unit stands behind a number
13.5 nm => show 13.5{nm}
13.5nm => show 13.5{nm}
1.2e3 W => show 1.2e3{W}
1.2E-3 W => show 1.2e-3{W}
1e−3 W => show 1e-3{W}
1 e => show 1{e}
2 eV => show 2{eV}
2e => show 2{e}
70 % => show 70{%}
70% => show 70{%}
6° => show 6{°}
5 ppb/K => show 5{ppb/K}
22 °C => show 22{°C}
13.5 Å => show 13.5{Å}
2 d => show 2{d}
2*d => show (* 2 d)
d => show d
250/n => show (/ 250 n)
250 / n => show (/ 250 n)
250 /n => show 250{/n}
20 /µm => show 20{/µm}
20 /(m*K) => show 20{/(m*K)}
20 /(3) => show (/ 20 3)
2*pi => show (* 2 pi)
2 * pi => show (* 2 pi)
1/2 m => show (/ 1 2{m})
3 nm^2 => show 3{nm^2}
(3 nm)^2 => show (^ 3{nm} 2)
3 nm² => show 3{nm²}
3 cm-1 => show 3{cm-1}
3 cm2 => show 3{cm2}
mJ/cm2*3 => show (* (/ mJ cm2) 3)
5 mJ/cm2*3 => show (* 5{mJ/cm2} 3)
5 mJ/cm^2 / 2 cm^2 => show (/ 5{mJ/cm^2} 2{cm^2})
5 m -2 m => show (- 5{m} 2{m})
5 m - 2 m => show (- 5{m} 2{m})
5 m^-1 => show 5{m^-1}
5 m^(1/2) => show 5{m^(1/2)}
5 m^x => show (^ 5{m} x)
5 m^(x) => show (^ 5{m} x)
5 W/(m*K) => show 5{W/(m*K)}
5 W/(m K) => show 5{W/(m K)}
5 W/(m*K) / (a b) ! b: b is not expected here; ) is missing for the parenthesis that opens this part
5 mJ·cm⁻² => show 5{mJ·cm⁻²}
5 m**2 => show 5{m**2}
5 mJ/cm2.s => show 5{mJ/cm2.s}
5 x_1 => show 5{x_1}
1_000 m => show 1000{m}
1 000 m ! 1 000: two values stand side by side; a product is written with *, and a unit stands right behind its number
## temperature points take a minus of their own
-5 degC => show -5{degC}
-5 °C => show -5{°C}
- 5 degC => show (- 5{degC})
-5 K => show (- 5{K})
3 degC -5 degC => show (- 3{degC} 5{degC})
2*-5 degC => show (* 2 -5{degC})
--5 degC => show (- -5{degC})
-5 degC ± 1 K => show <-5{degC}±1{K}>
## uncertain values
13.50(2) nm => show 13.50(2){nm}
30 mJ/cm^2 ± 2 % => show <30{mJ/cm^2}±2{%}>
30 mJ/cm^2 ± 0.6 mJ/cm^2 => show <30{mJ/cm^2}±0.6{mJ/cm^2}>
30 +/- 0.6 => show <30±0.6>
(30 ± 0.6) mJ/cm^2 => show <both 30{mJ/cm^2}±0.6>
(66.0 ± 0.5) % => show <both 66.0{%}±0.5>
66 % ± 0.5 % => show <66{%}±0.5{%}>
30 W ± 3 % (k=2) => show <30{W}±3{%} k=2>
30 W ± 3 % (p=95 %, nu=4) => show <30{W}±3{%} p=95% nu=4>
13.50(2) nm (k=2) => show <13.50(2){nm} k=2>
(30 ± 0.6) W (k=2) at IF => show (at <both 30{W}±0.6 k=2> IF)
30 W ± 3 % at IF => show (at <30{W}±3{%}> IF)
30 ± x ! x: x is not expected here; behind ± stands a number, as in 30 mJ/cm^2 ± 2 %
30 ± 2 (k=) ! ): ) is not expected here; a number is wanted, as in (k=2), (p=95 %) or (nu=4)
30 ± 2 (k=2, 3=4) ! 3: 3 is not expected here; a word is wanted, as in (k=2), (p=95 %) or (nu=4)
30 ± 2 (k=2 ! : the end of the line is not expected here; ) is missing behind what is said of the uncertainty
30 ± 2 ± 3 ! ±: ± is not expected here; a value is wanted between two signs
## planes bind like units
250 W at IF => show (at 250{W} IF)
2*250 W at IF => show (* 2 (at 250{W} IF))
P at IF + Q at MASK => show (+ (at P IF) (at Q MASK))
(a + b) at IF => show (at (+ a b) IF)
f(x) at IF => show (at f(x) IF)
0.9 % at WAFER/IF => show (at 0.9{%} WAFER/IF)
P at IF/2 => show (/ (at P IF) 2)
P at IF /n => show (/ (at P IF) n)
P at IF^2 => show (^ (at P IF) 2)
P at IF at MASK => show (at (at P IF) MASK)
P at ! : the end of the line is not expected here; a plane is wanted
P at 5 ! 5: 5 is not expected here; a plane is wanted
P at at ! at: at is a word of the language and cannot be a plane; choose another name, such as at_1
## calls, named arguments, conditions, lists
f() => show f()
f(a, 2 m) => show f(a 2{m})
f(1,5) => show f(1 5)
photon_count(dose, area = 400 nm^2) => show photon_count(dose area=400{nm^2})
f(over = 2, in = 3) => show f(over=2 in=3)
if(a < b, x, y) => show if((< a b) x y)
if(a ≤ b + 1, x, -y) => show if((<= a (+ b 1)) x (- y))
f(g(h(1))) => show f(g(h(1)))
{a, b, c} => show {a b c}
{1,5} => show {1 5}
{} => show {}
sum({1 m, 2 m}) => show sum({1{m} 2{m}})
lots.dose => show lots.dose
"text" => show "text"
f("a b", 2) => show f("a b" 2)
λ_0*Δx => show (* λ_0 Δx)
`)
}

func TestStatements(t *testing.T) {
	reads(t, `
5 m [cm] => show 5{m} [cm]
dose * area [mJ] => show (* dose area) [mJ]
P [W at IF] => show P [W at IF]
P [% at WAFER/IF] => show P [% at WAFER/IF]
P [at IF] => show P [at IF]
P [ W\tat  IF ] => show P [W at IF]
x [/µm] => show x [/µm]
dose = 30 mJ/cm^2 # line 3 => define dose 30{mJ/cm^2} #line 3
P_IF [W] = 250 W at IF => define P_IF [W] (at 250{W} IF)
P [W at IF] = x => define P [W at IF] x
x = -3 => define x (- 3)
x=y => define x y
if = 3 => define if 3
f(a, b) = a*b => function f a b is (* a b)
f(P [W at IF], t [s]) = P*t # energy => function f P [W at IF] t [s] is (* P t) #energy
f(x) [m] = x => function f x is [m] x
f() = 5 => function f is 5
f(x) => show f(x)
f(x) + 1 => show (+ f(x) 1)
f(2) = 3 ! =: = compares nothing here; write check a = b, or if(a < b, x, y)
# a note => nothing #a note
#a#b => nothing #a#b
check a >= b => check >= a b
check a ≥ b => check >= a b
check a = b within 2 % => check = a b within 2{%}
check (a) = (b) within 1 nm => check = a b within 1{nm}
check (a) = b => check = a b
check a < b # note => check < a b #note
check a ! : the end of the line is not expected here; check compares: check a >= b, or check a = b within 2 %
check a == b ! ==: == is no operator here; check a = b within 2 % compares; name = formula defines
why dose => why dose
why a b ! a b: two values stand side by side; a product is written with *, and a unit stands right behind its number
why ! : the end of the line is not expected here; why takes a name: why NAME
material resist = C8H8O 1.17 g/cm^3 # open => material resist C8H8O 1.17{g/cm^3} #open
material resist = (C8H8O)2 x*2 => material resist (C8H8O)2 (* x 2)
forget a, b => forget a b
forget a b => forget a b
forget a, ! : the end of the line is not expected here; a name is wanted behind the comma
forget ! : the end of the line is not expected here; forget takes a name: forget NAME
counted lot => counted lot
walk line3 250 W at IF => walk line3 (at 250{W} IF)
walk line3 ! : the end of the line is not expected here; a number, a name or a parenthesis is wanted
prefer [mJ/cm^2] => prefer [mJ/cm^2]
prefer mJ ! mJ: mJ is not expected here; prefer takes a unit in brackets: prefer [mJ/cm^2]
digits 5 => digits5
digits five ! five: five is not expected here; digits takes a whole number: digits 5
import "a b.budget" # x => import "a b.budget" #x
import a ! a: a is not expected here; import takes a file name in quotes: import "line3.budget"
save "x" => save "x"
replay "x" => replay "x"
names => names
names do* => names "do*"
names [a-c]? # n => names "[a-c]?" #n
names [ => names "["
help => help
help sqrt => help "sqrt"
help 250 W at IF => help "250 W at IF"
help % => help "%"
quit => quit
quit now ! quit now: two values stand side by side; a product is written with *, and a unit stands right behind its number
## words of the language are no names
check = 5 ! check: check is a word of the language and cannot be a name; choose another name, such as check_1
help = 5 ! help: help is a word of the language and cannot be a name; choose another name, such as help_1
within = 5 ! within: within is a word of the language and cannot be a name; choose another name, such as within_1
in(x) = x ! in: in is a word of the language and cannot be a name; choose another name, such as in_1
f(in) = 5 ! in: in is a word of the language, no value; see: help statements
1 + for ! for: for is a word of the language, no value; see: help statements
a.b = 5 ! a.b: a.b has a point, and a name has none; choose another name, such as a_b
a.b(x) = 5 ! a.b: a.b has a point, and a name has none; choose another name, such as a_b
f(a.b) = 5 ! =: = compares nothing here; write check a = b, or if(a < b, x, y)
`)
}

func TestStudies(t *testing.T) {
	reads(t, `
budget dose*area => budget (* dose area)
budget x [mJ] => budget x [mJ]
propagate x => propagate x
propagate x [nm] : trials = 1e6, seed = 1, plot => propagate x [nm] trials=1e6 seed=1 plot
correlation a, b = 0.8 => correlation a b 0.8
correlation a, b = -0.8 => correlation a b (- 0.8)
sweep x = 1 nm .. 2 nm by 0.1 nm : y => sweep x 1{nm}..2{nm} by 0.1{nm}; y
sweep x = 10..90 by 5 : y, z [mJ] plot to "a.csv" => sweep x 10..90 by 5; y, z [mJ] plot to "a.csv"
sweep x = 1 .. 2, 41 points log : y => sweep x 1..2 points 41 log; y
sweep x = 1 .. 2 by 1, y = 3 .. 4 by 1 : x*y => sweep x 1..2 by 1; y 3..4 by 1; (* x y)
solve f(x) = 3 W for x in 1 m .. 2 m => solve f(x) = 3{W} for x 1{m}..2{m}
maximise x*(1 - x) for x in 0 .. 1 => maximise (* x (- 1 x)) for x 0..1
minimise y for x in a .. b => minimise y for x a..b
fit lots.y = a*lots.x + b over lots for a, b => fit lots.y = (+ (* a lots.x) b) over lots for a b
case high : P = 300 W at IF, R = 66 % => case high P=(at 300{W} IF) R=66{%}
compare a, b [mJ] : base, high => compare a, b [mJ] : base high
data lots = "lots.csv" => data lots "lots.csv"
sweep x = 1 .. 2 : y ! :: : is not expected here; behind a range stands its step, by 0.1 nm, or a number of points, 41 points
sweep x : y ! :: : is not expected here; = is missing as in sweep x = 1 nm .. 2 nm by 0.1 nm : …
solve f(x) for x in 1 .. 2 ! for: for is not expected here; = is missing as in solve f = 3 W for x in 1 .. 2
fit y = x ! : the end of the line is not expected here; over is wanted: fit … over DATA for a, b
case : x = 3 ! :: : is not expected here; the name of the case is wanted
compare a ! : the end of the line is not expected here; : is missing between the values and the cases, as in compare x, y : base, NAME
data lots = lots.csv ! lots.csv: lots.csv is not expected here; a file name in quotes is wanted: data NAME = "file.csv"
`)
}

func TestBlocks(t *testing.T) {
	reads(t, `
chain line3\nend => chain line3
chain line3 # note\n  at IF\n\n  # only a note\n  m x4: (66.0 ± 0.5) % # four\n  at WAFER\nend => chain line3; at IF; m x4: <both 66.0{%}±0.5> #four; at WAFER #note
chain c\n a: T\n b x(n): T*2\n c x2 independent: 5 %\n reduction: 4, 4\nend # done => chain c; a: T; b xn: (* T 2); c x2 independent: 5{%}; reduction: 4 4
chain\tc\n\tat\tIF\nend => chain c; at IF
chain c\n x4: 1\n x: 2\n x x4: 3\nend => chain c; x4: 1; x: 2; x x4: 3
chain c\n m: 1\nend\n\n => chain c; m: 1
stack std\n  cap: Ru 2.5 nm\n  bilayer x50: Si 4.15 nm, Mo 2.85 nm rough 0.6 nm # pairs\n  roughness: 0.4 nm\n  substrate: Si\nend => stack std; cap: (layer Ru 2.5{nm}); bilayer x50: (layer Si 4.15{nm}) (layer Mo 2.85{nm} rough 0.6{nm}) #pairs; roughness: 0.4{nm}; substrate: Si
stack s\n a: Si d\n b: Si (d + 1 nm)\n c: Si 2*d\nend => stack s; a: (layer Si d); b: Si((+ d 1{nm})); c: (layer Si (* 2 d))
chain ! : the end of the line is not expected here; chain begins a block: chain NAME, lines of the form label: value, and end
chain 5\nend ! 5: 5 is not expected here; the name of a chain is wanted
chain at\nend ! at: at is a word of the language and cannot be the name of a chain; choose another name, such as at_1
chain a.b\nend ! a.b: a.b has a point, and a name has none; choose another name, such as a_b
chain c d\nend ! d: d is not expected here; the heading is chain c alone; each line of the block stands below it
chain c at IF\nend ! at: at is not expected here; the heading is chain c alone; each line of the block stands below it
chain c\n at IF ! chain c: the block that begins here has no end; its last line is the word end
chain c ! chain c: the block that begins here has no end; its last line is the word end
chain c\nend\n5 m ! 5 m: this stands behind the end of the block; give it as a statement of its own
chain c\n m 5\nend ! 5: 5 is not expected here; : is missing behind the label
chain c\n m:\nend ! : the end of the line is not expected here; a number, a name or a parenthesis is wanted
chain c\n m x4 x5: 1\nend ! x5: x5 is not expected here; : is missing behind the label
chain c\n m x(2: 1\nend ! :: : is not expected here; ) is missing behind how often light crosses
chain c\n m x 4: 1\nend ! 4: 4 is not expected here; ( is missing behind x: write x4 or x(name)
chain c\n 5: 1\nend ! 5: 5 is not expected here; a line of a block is label: value, or at PLANE; end closes the block
chain c\n a: 1\n m: 1 +\nend ! : the end of the line is not expected here; a number, a name or a parenthesis is wanted
chain c\n a: 1\n m: 1 2\nend ! 1 2: two values stand side by side; a product is written with *, and a unit stands right behind its number
chain = 5 ! chain: chain is a word of the language and cannot be a name; choose another name, such as chain_1
`)
}

func TestRefusals(t *testing.T) {
	reads(t, `
1,5 ! 1,5: 1,5 may be a decimal comma or a group of digits; write 1.5 for the decimal; a list has a blank behind its comma
1.000,5 ! 1.000,5: 1.000,5 may be a decimal comma or a group of digits; write 1000.5
13.5 nm in eV ! in: in is not expected here; a bracket states the unit of an answer: photon_energy(13.5 nm) [J]
x = 43,279 ! 43,279: 43,279 may be a decimal comma or a group of digits; write 43.279 for the decimal, 43279 for the group; a list has a blank behind its comma
(1) + 1,5 m ! 1,5: 1,5 may be a decimal comma or a group of digits; write 1.5 for the decimal; a list has a blank behind its comma
5. ! 5.: a number has digits on both sides of its point; write 5 or 5.0
.5 ! .: a number has digits on both sides of its point; write 0.5 for .5 and 5 for 5.
5.m ! .: a number has digits on both sides of its point; write 0.5 for .5 and 5 for 5.
5 5 ! 5 5: two values stand side by side; a product is written with *, and a unit stands right behind its number
2 (3) ! 2 (: two values stand side by side; a product is written with *, and a unit stands right behind its number
a b ! a b: two values stand side by side; a product is written with *, and a unit stands right behind its number
a ** b ! **: ** is no operator here; a power is written x^2, a product x*y
a % b ! %: % stands right behind a number only; write 70 % or 6°, or multiply by 1 %
a ° ! °: ° stands right behind a number only; write 70 % or 6°, or multiply by 1 °
(a + b ! : the end of the line is not expected here; ) is missing for the parenthesis that opens this part
a + b) ! ): nothing is open that ) would close; leave it out, or open it before
a} ! }: nothing is open that } would close; leave it out, or open it before
{a, b ! : the end of the line is not expected here; } is missing behind the list
{a, } ! }: } is not expected here; a number, a name or a parenthesis is wanted
f(a, ) ! ): ) is not expected here; a number, a name or a parenthesis is wanted
f(a ! : the end of the line is not expected here; ) is missing behind the arguments of f
f(a b) ! b: b is not expected here; ) is missing behind the arguments of f
1 + ! : the end of the line is not expected here; a number, a name or a parenthesis is wanted
* 3 ! *: * is not expected here; a number, a name or a parenthesis is wanted
1 + * 3 ! *: * is not expected here; a number, a name or a parenthesis is wanted
m: 0.5 ! :: : is not expected here; a line of the form label: value stands in a block, such as chain NAME … end
a < b ! <: < compares nothing here; write check a < b, or if(a < b, x, y)
"abc ! "abc: this text has no closing quote; texts are written "like this", on one line
5 m [cm ! [cm: this bracket is not closed; a stated unit is written [mJ/cm^2]
5 m [] ! []: this bracket is empty; a stated unit is written [mJ/cm^2]; leave the bracket out where none is meant
5 m [W at] ! [W at]: behind at stands a plane; write [W at IF]
x = 5 m [cm] ! [cm]: the unit of a definition stands behind its name; write x [cm] = …
(5 [m]) ! [m]: [m] is not expected here; ) is missing for the parenthesis that opens this part
5 m [cm] [mm] ! [mm]: a bracket states the unit of the whole answer and stands once, at the end; write the unit behind its number without a bracket
a ? b ! ?: ? has no meaning here; see: help language
a; b ! ;: ; has no meaning here; see: help language
x² ³ ! ² ³: two values stand side by side; a product is written with *, and a unit stands right behind its number
material = 5 ! material: material is a word of the language and cannot be a name; choose another name, such as material_1
material a.b = C8H8O 1.17 g/cm^3 ! a.b: a.b has a point, and a name has none; choose another name, such as a_b
material resist = ! : the end of the line is not expected here; a formula and a density are wanted, as in material resist = C8H8O 1.17 g/cm^3
material resist = C8H8O ! : the end of the line is not expected here; a formula and a density are wanted, as in material resist = C8H8O 1.17 g/cm^3
material resist C8H8O ! C8H8O: C8H8O is not expected here; = is wanted, as in material resist = C8H8O 1.17 g/cm^3
## what is not seen, or is no text
a\0b ! <U+0000>: <U+0000> is not seen on a screen and has no meaning here; remove it
a \x b ! <not UTF-8>: the byte FF is no UTF-8 text; save or paste the text as UTF-8
x = 5 # note \x ! <not UTF-8>: the byte FF is no UTF-8 text; save or paste the text as UTF-8
import "\0" ! <U+0000>: <U+0000> is not seen on a screen and has no meaning here; remove it
help \x ! <not UTF-8>: the byte FF is no UTF-8 text; save or paste the text as UTF-8
names \0 ! <U+0000>: <U+0000> is not seen on a screen and has no meaning here; remove it
1 +\n2 ! \n: a statement is one line; give each line to itself; blocks end with a line end
x = 5 # a\n| 6 ! \n: a statement is one line; give each line to itself; blocks end with a line end
`)
	for _, hidden := range []string{"\u202E", "\u2066", "\u200F", "\u061C", "\u2028", "\u2029", "\u0085", "\x1b", "\x7f", "\r"} {
		for _, where := range []string{"a%b", "5 %m", "x = 1 # %", `import "%"`, "[%]", "names %", "%", "chain c\n m: 1 # %\nend"} {
			text := strings.Replace(where, "%", hidden, 1)
			if _, err := Parse(text); err == nil || len(err.Marks) != 1 || text[err.Marks[0].Start:err.Marks[0].End] != hidden {
				t.Errorf("%q: %v", text, err)
			}
		}
	}
	for _, unseen := range []string{"\u200B", "\uFEFF", "\u00AD"} {
		if got := outcome(unseen + "5" + unseen + " + " + unseen + "3"); got != "show (+ 5 3)" {
			t.Errorf("%q beside numbers: %s", unseen, got)
		}
	}
	if got := outcome("\uFFFD"); got != "\uFFFD: \uFFFD has no meaning here; see: help language" {
		t.Errorf("a replacement mark: %s", got)
	}
}
