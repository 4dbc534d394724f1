//! `view!`: markup in the source, compiled into one text, one walk and the values that go into it.
//!
//! The browser parses the text once and copies it wherever the view is made; the walk says where in the copy each value
//! belongs. What a view costs in the page's code is one call for each value, not one for each element.
//!
//! ```text
//! view! { <p class="say" id=id on:click=press>"Kept on " {phone} "."</p> }
//!
//! text    <p class="say">Kept on <!>.</p>
//! walk    down to the first root; two values on it; down; on; a value before this; up
//! values  id, press, phone
//! ```
//!
//! Attributes: `name="text"`, `name=value`, `prop:name=value`, `class:name=holds`, `style=("--name", value)`,
//! `on:event=handler`, `inner_html=value`. Children: `"text"` and `{value}`. A part of the page is a plain function.

mod shape;
mod tags;

use proc_macro::TokenStream;
use quote::quote;
use rstml::node::{Infallible, Node};
use rstml::{Parser, ParserConfig};

/// A `Piece` from markup. The crate that calls it has `crate::piece`.
#[proc_macro]
pub fn view(input: TokenStream) -> TokenStream {
    let parser = Parser::<Infallible>::new(ParserConfig::default().recover_block(true));
    let parsed: syn::Result<Vec<Node>> = parser.parse_recoverable(input).into_result();
    match parsed.and_then(|nodes| shape::Shape::of(&nodes)) {
        Ok(shape) => shape.code().into(),
        Err(error) => {
            let error = error.to_compile_error();
            quote! { { #error } }.into()
        }
    }
}
