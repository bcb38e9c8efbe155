//! Parts of the job file that come in kinds: `{"kind": "piston", …}`.
//!
//! Serde's own tagging loses the path of an error inside; here the kind is taken out first and the rest is
//! read with its path kept, which the message carries in front, set off by [`PATH_MARK`].

use serde::de::{DeserializeOwned, Error};
use serde_json::Value;

/// Sets off the inner path from the message inside an error's text.
pub(super) const PATH_MARK: char = '\u{1}';

/// Takes `kind` out of an object.
pub(super) fn kind_of<E: Error>(value: &mut Value) -> Result<String, E> {
    let object = value.as_object_mut().ok_or_else(|| E::custom("an object with a \"kind\" is expected"))?;
    match object.remove("kind") {
        Some(Value::String(kind)) => Ok(kind),
        Some(_) => Err(E::custom(format!("kind{PATH_MARK}text is expected"))),
        None => Err(E::missing_field("kind")),
    }
}

/// Reads the rest of such an object, keeping the path of an error.
pub(super) fn rest<T: DeserializeOwned, E: Error>(value: Value) -> Result<T, E> {
    serde_path_to_error::deserialize(value).map_err(|e| {
        let (path, inner) = (e.path().to_string(), e.into_inner().to_string());
        E::custom(if path == "." { inner } else { format!("{path}{PATH_MARK}{inner}") })
    })
}

/// An enum tagged by `kind`, whose variants each hold one struct.
macro_rules! by_kind {
    ($(#[$doc:meta])* pub enum $name:ident { $($(#[$vdoc:meta])* $tag:literal => $variant:ident($inner:ty),)+ }) => {
        $(#[$doc])*
        #[derive(Clone, Debug, PartialEq, serde::Serialize)]
        #[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
        #[serde(tag = "kind", rename_all = "kebab-case")]
        pub enum $name { $($(#[$vdoc])* $variant($inner),)+ }

        impl<'de> serde::Deserialize<'de> for $name {
            fn deserialize<D: serde::Deserializer<'de>>(from: D) -> Result<Self, D::Error> {
                let mut value = <serde_json::Value as serde::Deserialize>::deserialize(from)?;
                let kind: String = $crate::job::by_kind::kind_of(&mut value)?;
                match kind.as_str() {
                    $($tag => $crate::job::by_kind::rest(value).map(Self::$variant),)+
                    other => Err(serde::de::Error::custom(format!(
                        "kind{}\"{other}\" is not known; allowed are {}",
                        $crate::job::by_kind::PATH_MARK,
                        [$($tag),+].join(", ")
                    ))),
                }
            }
        }
    };
}
pub(super) use by_kind;
