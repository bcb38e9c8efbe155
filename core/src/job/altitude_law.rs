//! Reading the altitude law: a word, or an object with a kind.

use serde::de::{Deserialize, Deserializer, Error};
use serde_json::Value;

use super::by_kind::rest;
use super::document::AltitudeLaw;

impl<'de> Deserialize<'de> for AltitudeLaw {
    fn deserialize<D: Deserializer<'de>>(from: D) -> Result<Self, D::Error> {
        match Value::deserialize(from)? {
            Value::String(word) if word == "naturally-aspirated" => Ok(Self::NaturallyAspirated),
            value @ Value::Object(_) => rest(value).map(Self::HeldTo),
            other => Err(D::Error::custom(format!(
                "{other} is not known; allowed are \"naturally-aspirated\" and {{\"kind\": \"held-to\", \
                 \"altitude_m\": …}}"
            ))),
        }
    }
}
