//! When the browser's storage is full, refused or damaged: it is said, and nothing is lost without a word.

use browser::{Result, Screen, Site, ensure, visit};
use serde_json::{Value, json};

/// A site of its own name, open and kept.
async fn kept_site(site: &Site, name: &str) -> Result<()> {
    site.press("Line").await?;
    site.press("Tarn cabin").await?;
    site.type_into("Name of the site", name).await?;
    site.leave().await?;
    site.is_written().await
}

/// The open site is closed, and another is open and kept.
async fn then_another(site: &Site, name: &str) -> Result<()> {
    site.press("Close this site").await?;
    site.element(".six-box").await?;
    kept_site(site, name).await
}

/// Reads or replaces records of the database from outside the page's own code.
async fn records(site: &Site, change: &str, arguments: &[Value]) -> Result<Value> {
    let script = format!(
        "return new Promise((done, failed) => {{
           const all = arguments;
           const open = indexedDB.open('linehut');
           open.onerror = () => failed(open.error);
           open.onsuccess = () => {{
             const change = open.result.transaction('kept', 'readwrite');
             const store = change.objectStore('kept');
             let found = null;
             {change}
             change.oncomplete = () => {{ open.result.close(); done(found?.result ?? null); }};
             change.onerror = () => failed(change.error);
           }};
         }})"
    );
    site.run(&script, arguments).await
}

async fn put(site: &Site, key: &str, value: Value) -> Result<()> {
    records(site, "store.put(all[1], all[0]);", &[key.into(), value]).await.map(drop)
}

async fn record(site: &Site, key: &str) -> Result<Value> {
    records(site, "found = store.get(all[0]);", &[key.into()]).await
}

#[test]
fn a_full_phone_is_told_and_what_was_typed_can_be_taken_along() {
    visit(Screen::PHONE, async |site| {
        // What the standard says a full store does: IndexedDB API 3.0, storing a record, and WebIDL's QuotaExceededError (from memory).
        site.before_load(
            "window.isFull = true;
             const put = IDBObjectStore.prototype.put;
             IDBObjectStore.prototype.put = function (...all) {
               if (window.isFull) throw new DOMException('no room', 'QuotaExceededError');
               return put.apply(this, all);
             };",
        )
        .await?;
        site.load().await?;
        site.press("Line").await?;
        site.press("Tarn cabin").await?;
        site.element(".kept[data-state=not-yet]").await?;
        site.shows("not kept on this phone: save the file").await?;
        site.press("not kept on this phone: save the file").await?;
        site.shows("Not kept on this phone: the phone is full").await?;
        site.heading("Tarn cabin the open site").await?;
        ensure!(site.value_of("Link that holds the site").await?.contains("#/site/"), "the link still holds it");
        site.press("Save the site").await?;
        site.shows("Saved as Tarn-cabin.json").await?;
        // Room is made: the next change is kept, and all before it.
        site.run("window.isFull = false", &[]).await?;
        site.press("Line").await?;
        site.type_on("Name of the site", "s").await?;
        site.leave().await?;
        site.is_written().await?;
        site.reload().await?;
        site.run("window.isFull = false", &[]).await?;
        site.element(".line .bus").await?;
        ensure!(site.value_of("Name of the site").await? == "Tarn cabins");
        Ok(())
    });
}

#[test]
fn a_browser_that_keeps_nothing_is_told_and_the_page_works_all_the_same() {
    visit(Screen::PHONE, async |site| {
        site.before_load("IDBFactory.prototype.open = () => { throw new DOMException('no', 'SecurityError'); };")
            .await?;
        site.load().await?;
        site.shows("not kept on this phone: save the file").await?;
        site.press("Line").await?;
        site.press("Kestrel Ridge hut").await?;
        site.shows("Cold string against the controller").await?;
        site.press("Sheet").await?;
        site.shows("Not kept on this phone: the browser keeps nothing for this page").await?;
        site.press("Save the site").await?;
        site.shows("Saved as Kestrel-Ridge-hut.json").await
    });
}

#[test]
fn a_damaged_site_is_named_and_left_as_it_is() {
    for damage in
        [json!(17), json!("1\n{\"linehut\":\"si"), json!(""), json!({ "a": [1] }), json!("x".repeat(2_000_000))]
    {
        visit(Screen::PHONE, async |site| {
            kept_site(site, "Tern Point").await?;
            then_another(site, "Gull Rock").await?;
            put(site, "site-1", damage.clone()).await?;
            site.reload().await?;
            ensure!(site.value_of("Name of the site").await? == "Gull Rock", "the other one is there");
            site.press("Sheet").await?;
            site.press("Tern Point").await?;
            site.shows("Cannot be read: ").await?;
            site.shows("It is left as it is").await?;
            site.press("Save what is there").await?;
            site.shows("Saved as linehut-site-1.json").await?;
            // A new one does not take its place.
            site.press("Line").await?;
            then_another(site, "Skerry").await?;
            ensure!(record(site, "site-1").await? == damage, "it was written over");
            site.no_complaints().await
        });
    }
}

#[test]
fn the_site_that_was_open_and_cannot_be_read_is_told_of() {
    visit(Screen::PHONE, async |site| {
        kept_site(site, "Tern Point").await?;
        let newer = json!("1\n{\"linehut\":\"site\",\"version\":9,\"name\":\"\",\"place\":{},\"parts\":[]}");
        put(site, "site-1", newer.clone()).await?;
        site.reload().await?;
        site.shows("The site that was open here cannot be read: ").await?;
        site.press("Line").await?;
        site.element(".six-box").await?;
        ensure!(record(site, "site-1").await? == newer, "what a newer one wrote is left alone");
        Ok(())
    });
}

#[test]
fn a_damaged_list_of_sites_loses_no_site() {
    for damage in [json!(null), json!(5), json!("\u{1}\u{2}"), json!("7\tGhost")] {
        visit(Screen::PHONE, async |site| {
            kept_site(site, "Tern Point").await?;
            site.press("Close this site").await?;
            site.element(".six-box").await?;
            site.is_written().await?;
            put(site, "sites", damage.clone()).await?;
            put(site, "earlier-1", json!([1, "x"])).await?;
            site.reload().await?;
            site.press("Line").await?;
            site.press("Tern Point").await?;
            site.element(".line .bus").await?;
            site.press("Sheet").await?;
            site.press("Earlier states of it").await?;
            site.press("Line").await?;
            // A new one goes beside it.
            then_another(site, "Gull Rock").await?;
            site.press("Sheet").await?;
            site.press("Tern Point").await?;
            site.heading("Tern Point the open site").await?;
            site.no_complaints().await
        });
    }
}
