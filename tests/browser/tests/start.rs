//! The Start tool as a person uses it: will the pump start, with no signal.

use browser::{Screen, visit};

#[test]
fn five_entries_give_a_verdict_on_both_screens() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            site.open_tool("Start").await?;
            site.says("Waits for").await?;
            site.choose("Load", "well pump, submersible").await?;
            site.enter(&[
                ("Running power", "900"),
                ("Inverter surge", "6000"),
                ("Bank voltage", "52"),
                ("Cut-off", "44"),
            ])
            .await?;
            // 900 W at a power factor of 0.8, times 6.25: 7031 VA.
            site.says("7031 VA of 6000 VA surge").await?;
            site.says("breaks").await?;
            site.fits().await?;
            Ok(())
        });
    }
}

/// 1.5 hp, code J, 0.5, 600 W besides, 19.96 mΩ behind 52 V: 12 296 VA, 48.9 V (by hand in the engine's tests).
#[test]
fn the_worked_pump() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Start").await?;
        site.unfold("More each lets more checks speak").await?;
        site.choose("Code letter", "J").await?;
        site.enter(&[
            ("Motor size", "1.5"),
            ("Starting power factor", "0.5"),
            ("Starting seconds", "1"),
            ("Running power", "1400"),
            ("Already running", "600"),
            ("Inverter surge", "12000"),
            ("Bank voltage", "52"),
            ("Bank resistance", "17.6"),
            ("Cable resistance", "2.36"),
            ("Cut-off", "44"),
        ])
        .await?;
        site.says("48.9").await?;
        site.says("over the inverter’s surge").await?;
        Ok(())
    });
}

#[test]
fn it_answers_with_the_server_stopped() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Start").await?;
        if !site.keeps_a_copy().await? {
            return Ok(());
        }
        site.choose("Load", "heater or kettle").await?;
        site.enter(&[("Running power", "1000"), ("Inverter surge", "3000"), ("Bank voltage", "52"), ("Cut-off", "44")])
            .await?;
        site.lose_signal().await?;
        site.reload().await?;
        site.says("of 3000 VA surge").await?;
        Ok(())
    });
}
