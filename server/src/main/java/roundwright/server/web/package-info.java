/**
 * What every page needs: rendering, forms, who may come in, error pages, headers. It knows HTTP and
 * templates, and neither SQL nor any feature.
 */
package roundwright.server.web;
