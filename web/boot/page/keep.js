// Keeps the job safe in this browser, so that neither a reload nor a crash loses it.
//
// Every page opened from disk shares one storage. The keys therefore carry a version and a mark of the
// job this very file was saved with: a page that came with another job does not find this one.
(function (page) {
  "use strict";
  var node = document.getElementById("page-job");
  var embedded = node ? node.textContent.trim() : "";
  var mark = embedded ? fingerprint(embedded) : "blank";
  // Two places by turns, so that a write that is cut off leaves the one before.
  var PLACES = ["spokeshave.1.job." + mark + ".0", "spokeshave.1.job." + mark + ".1"];
  var ASIDE = "spokeshave.1.aside." + mark;
  var BESIDE = "spokeshave.1.beside." + mark;
  var AT_WORK = "spokeshave.1.at-work." + mark;
  var latest = null;
  var leaving = false;

  // 32-bit FNV-1a over UTF-16 units: tells files apart and whole text from half of it.
  function fingerprint(text) {
    var hash = 0x811c9dc5;
    for (var i = 0; i < text.length; i += 1) {
      hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193);
    }
    return (hash >>> 0).toString(16);
  }

  function read(key) {
    try { return window.localStorage.getItem(key); } catch (refused) { return null; }
  }

  // False where the browser refuses storage or has no room left.
  function write(key, text) {
    try { window.localStorage.setItem(key, text); return true; } catch (refused) { return false; }
  }

  function remove(key) {
    try { window.localStorage.removeItem(key); } catch (refused) { return; }
  }

  // What a place holds: "turn checksum job"; nothing where the checksum says that it is not whole.
  function whole(key) {
    var parts = /^(\d+) ([0-9a-f]+) ([^]*)$/.exec(read(key) || "");
    return parts && fingerprint(parts[3]) === parts[2] ? { turn: Number(parts[1]), job: parts[3] } : null;
  }

  function newest() {
    var first = whole(PLACES[0]), second = whole(PLACES[1]);
    return second && (!first || second.turn > first.turn) ? second : first;
  }

  // Over the older of the two.
  function keep(job) {
    var last = newest(), turn = last ? last.turn + 1 : 0;
    return write(PLACES[turn % 2], turn + " " + fingerprint(job) + " " + job);
  }

  page.keep = {
    // The job to start with: the one kept here, else the one in the file, else null (an example).
    // An empty string kept here says that the user chose the example.
    atStart: function () {
      var kept = newest();
      if (!kept) { return embedded || null; }
      return kept.job || null;
    },
    // Whether something was kept here that is not whole: the browser ended in the middle of a write.
    torn: function () {
      return PLACES.some(function (key) { return read(key) !== null && !whole(key); });
    },
    // The job this very file was saved with, else null.
    inFile: function () { return embedded || null; },
    // Call before working a job out. The job goes into storage and into this document, so that the
    // browser's own save command takes it along. Returns whether storage took it.
    before: function (json) {
      latest = json;
      if (node) { node.textContent = json.replace(/</g, "\\u003c"); }
      var kept = keep(json);
      if (!leaving) { write(AT_WORK, "1"); }
      return kept;
    },
    // Blades beside the drawn one, as JSON; kept here and not in the job.
    putBeside: function (json) { return json ? write(BESIDE, json) : (remove(BESIDE), true); },
    beside: function () { return read(BESIDE); },
    // Call when the job has been worked out and shown.
    after: function () { if (!page.stopped) { remove(AT_WORK); } },
    // The page has stopped over this job: the next start asks before it tries again.
    stopped: function () { write(AT_WORK, "1"); },
    heldBack: function () { return read(AT_WORK) !== null && page.keep.atStart() !== null; },
    tryAgain: function () { remove(AT_WORK); },
    // The latest job, for a person to save.
    latest: function () { return latest || page.keep.atStart(); },
    // Puts the job aside and starts with an example from now on.
    setAside: function () {
      var job = page.keep.latest();
      if (job) { write(ASIDE, job); }
      keep("");
      remove(AT_WORK);
    }
  };

  // Leaving in the middle of a computation is no crash. What was being typed is meant, as when its box is left.
  window.addEventListener("pagehide", function () {
    leaving = true;
    page.keep.after();
    if (document.activeElement) { document.activeElement.blur(); }
  });
  // Come back to with the browser's Back.
  window.addEventListener("pageshow", function () { leaving = false; });
})(window.spokeshave = window.spokeshave || {});
