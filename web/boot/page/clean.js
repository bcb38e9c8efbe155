// A copy saved with the browser's own command carries what the application had drawn and whatever the
// browser or its add-ons put in. Before the application starts, only the parts of the file are left.
(function (page) {
  "use strict";
  var PARTS = ["app", "page-job", "page-boot", "page-opener", "page-opener-glue", "page-engine", "page-glue"];

  function dropAttributes(node, kept) {
    Array.prototype.slice.call(node.attributes).forEach(function (attribute) {
      if (attribute.name !== kept) { node.removeAttribute(attribute.name); }
    });
  }

  page.clean = function () {
    var app = document.getElementById("app");
    app.textContent = "";
    dropAttributes(app, "id");
    dropAttributes(document.body, "");
    dropAttributes(document.documentElement, "lang");
    document.title = "Spokeshave";
    Array.prototype.slice.call(document.body.children).forEach(function (child) {
      if (PARTS.indexOf(child.id) < 0 && child.nodeName !== "NOSCRIPT") { child.remove(); }
    });
  };
})(window.spokeshave);
