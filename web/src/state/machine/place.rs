//! Where a figure stands in the aircraft or the engine: one table serves reading, writing and taking out.

/// A figure's place, borrowed to read or to write.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(in crate::state) enum Place<F, M, C> {
    /// A figure that is always there.
    Figure(F),
    /// A figure the job may go without.
    Maybe(M),
    /// A whole number.
    Count(C),
}

/// A place to read.
pub(in crate::state) type Read<'a> = Place<&'a f64, &'a Option<f64>, &'a u32>;
/// A place to write.
pub(in crate::state) type Write<'a> = Place<&'a mut f64, &'a mut Option<f64>, &'a mut u32>;

impl Read<'_> {
    /// The figure that stands there.
    #[must_use]
    pub(in crate::state) fn value(self) -> Option<f64> {
        match self {
            Self::Figure(value) => Some(*value),
            Self::Maybe(value) => *value,
            Self::Count(count) => Some(f64::from(*count)),
        }
    }
}

impl Write<'_> {
    /// Puts a figure there.
    pub(in crate::state) fn put(self, value: f64) {
        match self {
            Self::Figure(place) => *place = value,
            Self::Maybe(place) => *place = Some(value),
            Self::Count(place) => *place = crate::state::field::whole(value),
        }
    }

    /// Takes the figure out; whether the job may go without it.
    pub(in crate::state) fn clear(self) -> bool {
        let Self::Maybe(place) = self else { return false };
        *place = None;
        true
    }
}

/// The two functions that find a figure's place, written once: `$part` is borrowed with or without `mut`.
macro_rules! places {
    ($figure:ty, $part:ty, |$self:ident, $at:ident| $($pattern:pat => $kind:ident($($place:tt)+)),+ $(,)?) => {
        impl $figure {
            fn read($self, $at: &$part) -> Option<$crate::state::machine::place::Read<'_>> {
                Some(match ($self, $at) {
                    $($pattern => $crate::state::machine::place::Place::$kind(&$($place)+),)+
                    _ => return None,
                })
            }

            fn place($self, $at: &mut $part) -> Option<$crate::state::machine::place::Write<'_>> {
                Some(match ($self, $at) {
                    $($pattern => $crate::state::machine::place::Place::$kind(&mut $($place)+),)+
                    _ => return None,
                })
            }
        }
    };
}
pub(super) use places;
