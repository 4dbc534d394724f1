//! Putting short lists in order.

use core::cmp::Ordering;

/// Sorts in place and keeps equals as they stand, by insertion.
///
/// For lists of a few dozen, where the code of a general sort is larger than its work; it takes n² / 4 comparisons.
pub fn sort_short<T>(list: &mut [T], mut compare: impl FnMut(&T, &T) -> Ordering) {
    for end in 1..list.len() {
        let mut place = end;
        while place > 0 && compare(&list[place - 1], &list[place]) == Ordering::Greater {
            list.swap(place - 1, place);
            place -= 1;
        }
    }
}

/// The first `most` of what `all` gives, in order, equals as they come.
pub fn first_of<T>(all: impl Iterator<Item = T>, most: usize, mut compare: impl FnMut(&T, &T) -> Ordering) -> Vec<T> {
    let mut first: Vec<T> = Vec::with_capacity(most + 1);
    for one in all {
        let place = first.iter().rposition(|other| compare(other, &one) != Ordering::Greater).map_or(0, |at| at + 1);
        if place < most {
            first.insert(place, one);
            first.truncate(most);
        }
    }
    first
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn both_give_what_a_general_sort_gives() {
        let mut state = 7_u32;
        for length in 0..40_u32 {
            let list: Vec<(u32, u32)> = (0..length)
                .map(|index| {
                    state = state.wrapping_mul(1_664_525).wrapping_add(1_013_904_223);
                    (state >> 29, index)
                })
                .collect();
            let by_first = |a: &(u32, u32), b: &(u32, u32)| a.0.cmp(&b.0);
            let mut wanted = list.clone();
            wanted.sort_by(by_first);
            let mut sorted = list.clone();
            sort_short(&mut sorted, by_first);
            assert_eq!(sorted, wanted);
            assert_eq!(first_of(list.into_iter(), 7, by_first), wanted[..wanted.len().min(7)]);
        }
    }
}
