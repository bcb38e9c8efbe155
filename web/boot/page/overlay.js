// What a person sees when the page cannot go on.
(function (page) {
  "use strict";

  function element(name, text, parent) {
    var made = document.createElement(name);
    if (text) { made.textContent = text; }
    if (parent) { parent.appendChild(made); }
    return made;
  }

  function button(text, act, parent) {
    var made = element("button", text, parent);
    made.type = "button";
    made.addEventListener("click", act);
    return made;
  }

  function download(text) {
    var link = document.createElement("a");
    link.href = URL.createObjectURL(new Blob([text], { type: "application/json" }));
    link.download = "spokeshave-job.json";
    link.click();
    window.setTimeout(function () { URL.revokeObjectURL(link.href); }, 10000);
  }

  function show(title, text, detail, choices) {
    var old = document.getElementById("boot-overlay");
    if (old) { old.remove(); }
    var back = element("div");
    back.id = "boot-overlay";
    var box = element("section", "", back);
    box.setAttribute("role", "alertdialog");
    box.setAttribute("aria-modal", "true");
    box.setAttribute("aria-labelledby", "boot-title");
    box.setAttribute("aria-describedby", "boot-text");
    element("h1", title, box).id = "boot-title";
    element("p", text, box).id = "boot-text";
    var row = element("p", "", box);
    if (page.keep.latest()) {
      button("Save the job as a file", function () { download(page.keep.latest()); }, row);
    }
    choices.forEach(function (choice) { button(choice[0], choice[1], row); });
    if (detail) {
      var more = element("details", "", box);
      element("summary", "What the program said", more);
      element("pre", detail, more);
    }
    document.body.appendChild(back);
    row.firstChild.focus();
  }

  function reload() { window.location.reload(); }

  // A fault in the program. The first report wins; what follows is only its echo.
  page.crashed = function (detail) {
    if (page.stopped) { return; }
    page.stopped = true;
    page.keep.stopped();
    show(
      "The page has stopped",
      "The program met a fault of its own and stopped. Your job is safe: save it as a file, then start again.",
      detail,
      [
        ["Start again with this job", function () { page.keep.tryAgain(); reload(); }],
        ["Start with an example", function () { page.keep.setAside(); reload(); }]
      ]
    );
  };

  // The page stopped over this job the last time: ask before trying it again.
  page.askFirst = function (start) {
    show(
      "This job stopped the page last time",
      "The program did not finish working this job out. The job is safe. Save it as a file before you try it again.",
      "",
      [
        ["Try it again", function () {
          page.keep.tryAgain();
          document.getElementById("boot-overlay").remove();
          start();
        }],
        ["Start with an example", function () { page.keep.setAside(); reload(); }]
      ]
    );
  };

  // Nothing to save or try: the browser lacks something.
  page.cannotStart = function (text) {
    var app = document.getElementById("app");
    app.textContent = "";
    element("p", text, app).className = "boot-message";
  };
})(window.spokeshave);
