//! Laws of dealing measured cells to groups.

use arbtest::arbitrary::{Result, Unstructured};
use engine::matching::{EXACT_UP_TO, MatchingError, deal};
use engine::quantity::AmpHours;

fn list(numbers: &[f64]) -> Vec<AmpHours> {
    numbers.iter().copied().map(AmpHours::new).collect()
}

fn range(sums: &[f64]) -> f64 {
    sums.iter().copied().fold(f64::MIN, f64::max) - sums.iter().copied().fold(f64::MAX, f64::min)
}

/// The least spread over all deals, by trying every group for every cell.
fn by_trying_everything(rest: &[f64], sums: &mut [f64], held: &mut [usize], each: usize, least: &mut f64) {
    let Some((&one, rest)) = rest.split_first() else {
        *least = least.min(range(sums));
        return;
    };
    for group in 0..sums.len() {
        if held[group] < each {
            let was = sums[group];
            held[group] += 1;
            sums[group] += one;
            by_trying_everything(rest, sums, held, each, least);
            sums[group] = was;
            held[group] -= 1;
        }
    }
}

/// In tenths of an ampere-hour, as meters give them.
fn any_cells(u: &mut Unstructured, most: usize) -> Result<Vec<f64>> {
    let many = u.int_in_range(1..=most)?;
    (0..many).map(|_| u.int_in_range(500..=3200u32).map(|tenths| f64::from(tenths) / 10.0)).collect()
}

#[test]
fn never_worse_than_in_the_order_listed_and_every_cell_once() {
    arbtest::arbtest(|u| {
        let cells = any_cells(u, 60)?;
        let groups = u.int_in_range(1..=cells.len())?;
        let deal = deal(&list(&cells), groups).unwrap();
        assert!(deal.spread.get() <= deal.naive_spread.get() + 1e-9);
        let each = cells.len() / groups;
        assert!(deal.groups.iter().all(|group| group.cells.len() == each));
        let mut all: Vec<usize> = deal.groups.iter().flat_map(|g| g.cells.clone()).chain(deal.spare.clone()).collect();
        all.sort_unstable();
        assert_eq!(all, (0..cells.len()).collect::<Vec<_>>());
        // What is left over holds no more than anything that is used.
        let used = deal.groups.iter().flat_map(|g| &g.cells).map(|&c| cells[c]).fold(f64::MAX, f64::min);
        assert!(deal.spare.iter().all(|&c| cells[c] <= used));
        let sums: Vec<f64> = deal.groups.iter().map(|g| g.cells.iter().map(|&c| cells[c]).sum()).collect();
        assert!((range(&sums) - deal.spread.get()).abs() < 1e-9);
        Ok(())
    });
}

#[test]
fn small_sets_are_dealt_as_well_as_can_be() {
    arbtest::arbtest(|u| {
        let mut cells = any_cells(u, 8)?;
        let groups = u.int_in_range(1..=cells.len().min(4))?;
        cells.truncate(cells.len() / groups * groups);
        let deal = deal(&list(&cells), groups).unwrap();
        assert!(deal.exact && cells.len() <= EXACT_UP_TO);
        let mut least = f64::INFINITY;
        let each = cells.len() / groups;
        by_trying_everything(&cells, &mut vec![0.0; groups], &mut vec![0; groups], each, &mut least);
        assert!((deal.spread.get() - least).abs() < 1e-9);
        Ok(())
    });
}

// 200 cells between 240 and 280 Ah, spread by a rule of whole numbers, to 50 groups of four.
#[test]
fn a_large_pallet_comes_out_nearly_even() {
    let cells: Vec<f64> = (0..200u32).map(|i| 240.0 + f64::from(i * 7919 % 401) / 10.0).collect();
    let deal = deal(&list(&cells), 50).unwrap();
    assert!(!deal.exact);
    assert!(deal.spread.get() <= 1.0, "{:?}", deal.spread);
    assert!(deal.naive_spread.get() > 10.0, "{:?}", deal.naive_spread);
}

#[test]
fn what_cannot_be_dealt_is_refused() {
    assert_eq!(deal(&list(&[1.0]), 0), Err(MatchingError::NoGroups));
    assert_eq!(deal(&list(&[1.0]), 2), Err(MatchingError::TooFewCells { cells: 1, groups: 2 }));
    for bad in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert!(matches!(deal(&list(&[1.0, bad]), 1), Err(MatchingError::NotACapacity { number: 2, .. })));
    }
}
