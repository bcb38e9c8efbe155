//! Puts the mutants into a source file: where an expression can be changed it becomes one that asks which
//! mutant acts.
//!
//! Operands are worked out once, before the choice, so that the code does not grow with the depth of an
//! expression. What is worked out by the compiler (constants, array lengths, `const fn`), patterns, tests and
//! the insides of macros stay as they are.

use std::collections::{HashMap, HashSet};

use proc_macro2::{Literal, Span};
use quote::ToTokens;
use syn::spanned::Spanned;
use syn::visit_mut::{self, VisitMut};
use syn::{BinOp, Expr, ExprBinary, ExprMethodCall, Ident, Lit, LitFloat, UnOp, parse_quote};

/// One small change of the source.
#[derive(Debug, Clone)]
pub struct Mutant {
    /// Its number in this build, from 1.
    pub number: u32,
    /// Line of its file.
    pub line: usize,
    /// File, column and change with the line's text: the same wherever that line has gone in its file, another
    /// as soon as it is written otherwise.
    pub key: String,
}

/// A constant is taken this many times.
const CONSTANT_FACTOR: f64 = 1.1;

/// Methods that are exchanged for others with as many arguments.
const METHODS: [(&str, &str, usize); 6] = [
    ("max", "min", 1),
    ("min", "max", 1),
    ("sin", "cos", 0),
    ("cos", "sin", 0),
    ("floor", "ceil", 0),
    ("ceil", "floor", 0),
];

/// The source with its mutants, those found so far being `mutants`; `refused` are the keys of those that do
/// not compile.
///
/// # Errors
/// Where the source cannot be read.
pub fn rewrite(
    file: &str,
    source: &str,
    mutants: &mut Vec<Mutant>,
    refused: &HashSet<String>,
) -> syn::Result<String> {
    let mut tree = syn::parse_file(source)?;
    let lines = source.lines().map(str::trim).collect();
    Rewriter { file, lines, taken: HashMap::new(), mutants, refused }.visit_file_mut(&mut tree);
    Ok(prettyplease::unparse(&tree))
}

struct Rewriter<'a> {
    file: &'a str,
    lines: Vec<&'a str>,
    /// How often each key was taken, for lines that are written twice.
    taken: HashMap<String, u32>,
    mutants: &'a mut Vec<Mutant>,
    refused: &'a HashSet<String>,
}

impl Rewriter<'_> {
    /// Takes up a mutant; gives the expression that asks for it, or nothing where the compiler refused it.
    fn asked(&mut self, at: Span, change: &str) -> Option<Expr> {
        let (line, column) = (at.start().line, at.start().column + 1);
        let text = self.lines.get(line - 1).unwrap_or(&"");
        let mut key = format!("{} {column} {change} in {text}", self.file);
        let times = self.taken.entry(key.clone()).or_default();
        *times += 1;
        if *times > 1 {
            key = format!("{key} ({times})");
        }
        if self.refused.contains(&key) {
            return None;
        }
        let number = u32::try_from(self.mutants.len() + 1).expect("fewer mutants");
        self.mutants.push(Mutant { number, line, key });
        let number = Literal::u32_unsuffixed(number);
        Some(parse_quote!(crate::mutants::chosen(#number)))
    }

    fn mutated(&mut self, e: &Expr) -> Option<Expr> {
        match e {
            Expr::Binary(binary) => self.operator(binary),
            Expr::Unary(unary) if !matches!(unary.op, UnOp::Deref(_)) => {
                let (op, x) = (&unary.op, &unary.expr);
                let asked = self.asked(op.span(), &format!("{} left out", op.to_token_stream()))?;
                Some(parse_quote!((match (#x) { x => if #asked { x } else { #op x } })))
            }
            Expr::MethodCall(call) => self.method(call),
            Expr::Lit(lit) => {
                let Lit::Float(was) = &lit.lit else { return None };
                let value: f64 = was.base10_parse().ok().filter(|v| *v != 0.0)?;
                let text = format!("{:?}{}", CONSTANT_FACTOR * value, was.suffix());
                let asked = self.asked(was.span(), &format!("{was} -> {text}"))?;
                let other = LitFloat::new(&text, Span::call_site());
                Some(parse_quote!((if #asked { #other } else { #was })))
            }
            _ => None,
        }
    }

    fn method(&mut self, call: &ExprMethodCall) -> Option<Expr> {
        let (x, method, args) = (&call.receiver, &call.method, &call.args);
        let name = method.to_string();
        if name == "abs" {
            let asked = self.asked(method.span(), "abs left out")?;
            return Some(parse_quote!((match (#x) { x => if #asked { x } else { x.abs() } })));
        }
        // An iterator's own `max` has no argument and is another thing.
        let (_, other, _) = METHODS.iter().find(|(from, _, n)| *from == name && args.len() == *n)?;
        let asked = self.asked(method.span(), &format!("{name} -> {other}"))?;
        let other = Ident::new(other, Span::call_site());
        Some(match args.first() {
            Some(y) => {
                parse_quote!((match (#x, #y) { (x, y) => if #asked { x.#other(y) } else { x.#method(y) } }))
            }
            None => parse_quote!((match (#x) { x => if #asked { x.#other() } else { x.#method() } })),
        })
    }

    fn operator(&mut self, binary: &ExprBinary) -> Option<Expr> {
        let ExprBinary { left, op, right, .. } = binary;
        if has_let(left) || has_let(right) {
            return None;
        }
        let mut others = Vec::new();
        for other in exchanged(*op) {
            let change = format!("{} -> {}", op.to_token_stream(), other.to_token_stream());
            others.extend(self.asked(op.span(), &change).map(|asked| (asked, other)));
        }
        let (asked, other) = others.first()?;
        Some(match op {
            BinOp::And(_) => parse_quote!((match #asked { m => if (#left) != m { #right } else { m } })),
            BinOp::Or(_) => parse_quote!((match #asked { m => if (#left) == m { #right } else { !m } })),
            BinOp::AddAssign(_) | BinOp::SubAssign(_) | BinOp::MulAssign(_) | BinOp::DivAssign(_) => {
                parse_quote!((match (#right) { y => if #asked { #left #other y } else { #left #op y } }))
            }
            BinOp::Add(_) | BinOp::Sub(_) | BinOp::Mul(_) | BinOp::Div(_) => {
                parse_quote!((match (#left, #right) { (x, y) => if #asked { x #other y } else { x #op y } }))
            }
            _ => {
                let compared = others.iter().fold(
                    parse_quote!({ x #op y }),
                    |last: Expr, (asked, other)| parse_quote!({ if #asked { x #other y } else #last }),
                );
                parse_quote!((match (&(#left), &(#right)) { (x, y) => #compared }))
            }
        })
    }

    /// The opposite of a condition that is not itself an operator's.
    fn condition(&mut self, e: &mut Expr) {
        let plain = matches!(
            e,
            Expr::MethodCall(_) | Expr::Call(_) | Expr::Path(_) | Expr::Field(_) | Expr::Macro(_)
        );
        let at = e.span();
        self.visit_expr_mut(e);
        if plain && let Some(asked) = self.asked(at, "condition -> its opposite") {
            *e = parse_quote!((#e != #asked));
        }
    }
}

/// What an operator is exchanged for, one after the other.
fn exchanged(op: BinOp) -> Vec<BinOp> {
    match op {
        BinOp::Add(_) => vec![parse_quote!(-)],
        BinOp::Sub(_) => vec![parse_quote!(+)],
        BinOp::Mul(_) => vec![parse_quote!(/)],
        BinOp::Div(_) => vec![parse_quote!(*)],
        BinOp::AddAssign(_) => vec![parse_quote!(-=)],
        BinOp::SubAssign(_) => vec![parse_quote!(+=)],
        BinOp::MulAssign(_) => vec![parse_quote!(/=)],
        BinOp::DivAssign(_) => vec![parse_quote!(*=)],
        BinOp::And(_) => vec![parse_quote!(||)],
        BinOp::Or(_) => vec![parse_quote!(&&)],
        BinOp::Eq(_) => vec![parse_quote!(!=)],
        BinOp::Ne(_) => vec![parse_quote!(==)],
        BinOp::Lt(_) => vec![parse_quote!(<=), parse_quote!(>=)],
        BinOp::Le(_) => vec![parse_quote!(<), parse_quote!(>)],
        BinOp::Gt(_) => vec![parse_quote!(>=), parse_quote!(<=)],
        BinOp::Ge(_) => vec![parse_quote!(>), parse_quote!(<)],
        _ => vec![],
    }
}

/// Whether an expression is, or joins, a `let` of a condition.
fn has_let(e: &Expr) -> bool {
    match e {
        Expr::Let(_) => true,
        Expr::Binary(b) => has_let(&b.left) || has_let(&b.right),
        _ => false,
    }
}

/// Whether an item is there for tests only.
fn of_tests(attributes: &[syn::Attribute]) -> bool {
    attributes.iter().any(|a| {
        let text = a.meta.to_token_stream().to_string();
        text == "test" || text.starts_with("cfg (test")
    })
}

impl VisitMut for Rewriter<'_> {
    fn visit_expr_mut(&mut self, e: &mut Expr) {
        visit_mut::visit_expr_mut(self, e);
        if let Some(mutated) = self.mutated(e) {
            *e = mutated;
        }
    }
    fn visit_expr_if_mut(&mut self, e: &mut syn::ExprIf) {
        self.condition(&mut e.cond);
        self.visit_block_mut(&mut e.then_branch);
        if let Some((_, other)) = &mut e.else_branch {
            // What follows `else` must stay a block or an `if`.
            visit_mut::visit_expr_mut(self, other);
        }
    }
    fn visit_expr_while_mut(&mut self, e: &mut syn::ExprWhile) {
        self.condition(&mut e.cond);
        self.visit_block_mut(&mut e.body);
    }
    fn visit_arm_mut(&mut self, arm: &mut syn::Arm) {
        if let Some((_, guard)) = &mut arm.guard {
            self.condition(guard);
        }
        self.visit_expr_mut(&mut arm.body);
    }
    fn visit_expr_repeat_mut(&mut self, e: &mut syn::ExprRepeat) {
        self.visit_expr_mut(&mut e.expr);
    }
    fn visit_item_mod_mut(&mut self, item: &mut syn::ItemMod) {
        if !of_tests(&item.attrs) {
            visit_mut::visit_item_mod_mut(self, item);
        }
    }
    fn visit_item_fn_mut(&mut self, item: &mut syn::ItemFn) {
        if item.sig.constness.is_none() && !of_tests(&item.attrs) {
            self.visit_block_mut(&mut item.block);
        }
    }
    fn visit_impl_item_fn_mut(&mut self, item: &mut syn::ImplItemFn) {
        if item.sig.constness.is_none() && !of_tests(&item.attrs) {
            self.visit_block_mut(&mut item.block);
        }
    }
    fn visit_item_const_mut(&mut self, _: &mut syn::ItemConst) {}
    fn visit_item_static_mut(&mut self, _: &mut syn::ItemStatic) {}
    fn visit_impl_item_const_mut(&mut self, _: &mut syn::ImplItemConst) {}
    fn visit_trait_item_const_mut(&mut self, _: &mut syn::TraitItemConst) {}
    fn visit_expr_const_mut(&mut self, _: &mut syn::ExprConst) {}
    fn visit_variant_mut(&mut self, _: &mut syn::Variant) {}
    fn visit_pat_mut(&mut self, _: &mut syn::Pat) {}
    fn visit_type_mut(&mut self, _: &mut syn::Type) {}
    fn visit_generic_argument_mut(&mut self, _: &mut syn::GenericArgument) {}
    fn visit_attribute_mut(&mut self, _: &mut syn::Attribute) {}
}

#[cfg(test)]
mod tests {
    use super::*;

    const SOURCE: &str = "const FAR: f64 = 2.0 * 3.0;\nfn f(a: f64, b: f64) -> f64 {\n    a * b\n}\n";

    fn rewritten(source: &str, refused: &[&str]) -> (String, Vec<Mutant>) {
        let mut mutants = Vec::new();
        let refused = refused.iter().map(|r| (*r).to_owned()).collect();
        let text = rewrite("f.rs", source, &mut mutants, &refused).expect("source that can be read");
        (text, mutants)
    }

    #[test]
    fn an_operator_asks_and_what_the_compiler_works_out_stays() {
        let (text, mutants) = rewritten(SOURCE, &[]);
        assert!(text.contains("if crate::mutants::chosen(1) { x / y } else { x * y }"), "{text}");
        assert!(text.contains("const FAR: f64 = 2.0 * 3.0;"), "{text}");
        let [only] = mutants.as_slice() else { panic!("{mutants:?}") };
        assert_eq!((only.number, only.line), (1, 3));
    }

    #[test]
    fn a_mutant_keeps_its_key_where_its_line_moves_and_loses_it_where_the_line_changes() {
        let key = |source: &str| rewritten(source, &[]).1[0].key.clone();
        assert_eq!(key(SOURCE), key(&format!("// One line more.\n{SOURCE}")));
        assert_ne!(key(SOURCE), key(&SOURCE.replace("a * b", "b * a")));
        let twice = format!("{SOURCE}{}", SOURCE.replace("f(", "g(").replace("FAR", "NEAR"));
        let (_, both) = rewritten(&twice, &[]);
        assert_ne!(both[0].key, both[1].key);
    }

    #[test]
    fn what_the_compiler_refused_and_tests_have_no_mutants() {
        let key = rewritten(SOURCE, &[]).1[0].key.clone();
        assert!(rewritten(SOURCE, &[&key]).1.is_empty());
        assert!(rewritten(&format!("#[cfg(test)]\nmod tests {{ {SOURCE} }}"), &[]).1.is_empty());
    }
}
